#!/bin/sh
# Takes over every answer that differs from the approved one: look at them first (git diff afterwards shows the change).
cd "$(dirname "$0")" || exit 1
for received in *.received; do
  [ -e "$received" ] && mv "$received" "${received%.received}"
done
exit 0
