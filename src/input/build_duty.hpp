#pragma once
#include <string>
#include <vector>

#include "builder.hpp"
#include "duty_draft.hpp"
#include "measure_of_amount.hpp"

namespace vatwright {

/// Judges the tables of a duty together, beside the site, and makes the duty of them. folder: of the duty's file, with
/// a slash at its end.
Duty build_duty(const DutyDraft& draft, const Site& site, const std::string& folder, const Builder& builder);

/// [target], with the feed rate however it was given; sum_of_rates: of [[feed]], where there are several.
Target build_target(const DutyDraft& draft, const Duty& duty, std::optional<double> sum_of_rates_m3_s,
                    const AmountReader& amounts, const Builder& builder);

/// [operation], [start] and [limits] into the duty. said_pressure: the feed states one.
void build_operation(const DutyDraft& draft, const Site& site, bool said_pressure, Duty& duty, const Builder& builder);

}  // namespace vatwright
