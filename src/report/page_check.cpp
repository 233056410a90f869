#include "page_parts.hpp"
#include "vatwright/report/page.hpp"

namespace vatwright {

std::string to_page(const CheckAnswer& answer, const Look& look) {
  Page page{look};
  add_head(page, "check", answer.head, look);
  page.heading("Understood");
  for (const std::string& sentence : answer.understood) page.paragraph(sentence, 2, 2);
  Head tail = answer.head;
  tail.cautions.clear();  // they belong to answers; nothing was rated
  add_tail(page, tail);
  return page.text();
}

}  // namespace vatwright
