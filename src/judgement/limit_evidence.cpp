#include "loqsmith/judgement/limit_evidence.hpp"

#include <algorithm>
#include <cstddef>

#include "loqsmith/calibration/inverse.hpp"
#include "loqsmith/judgement/carry_over_check.hpp"
#include "loqsmith/judgement/sample_units.hpp"

namespace loqsmith {
namespace {

constexpr double kLowRange = 10.0;  // times the lowest standard above zero

bool has(const std::vector<std::string>& words, const char* word) {
  return std::find(words.begin(), words.end(), word) != words.end();
}

// A method blank holds a surrogate like everything that was prepared.
bool holds_surrogate(const InjectionResponse& one,
                     const MeasuredAnalyte& analyte) {
  return analyte.settings->surrogate_concentration &&
         one.injection->role == Role::MethodBlank;
}

bool level_is_in_the_vial(Role role) {
  return role == Role::Standard || role == Role::SecondSource ||
         role == Role::CheckStandard;
}

bool is_high(const InjectionResponse& one, const Calibration& calibration) {
  const double half =
      0.5 * calibration.accepted_highest.value_or(calibration.highest);
  if (one.nominal && level_is_in_the_vial(one.injection->role) &&
      *one.nominal > half) {
    return true;
  }
  return one.response &&
         one.response->value > response_from_concentration(calibration, half);
}

bool follows_high(const MeasuredAnalyte& analyte, int number,
                  const Calibration& calibration) {
  const InjectionResponse* before = right_before(analyte, number);
  return before != nullptr && is_high(*before, calibration);
}

std::optional<SpikeResult> spike_result(const InjectionResponse& one,
                                        const MeasuredAnalyte& analyte,
                                        const Calibration& calibration) {
  if (one.injection->role != Role::LowSpike || !one.nominal || !one.response) {
    return std::nullopt;
  }
  const Outcome<InversePrediction> found =
      concentration_from_response(calibration, one.response->value);
  if (!found) return std::nullopt;
  const double factor = sample_factor(*one.injection, *analyte.units);
  return SpikeResult{one.injection->number,
                     *one.nominal / factor,
                     found->concentration,
                     one.injection->prep,
                     one.peak && one.peak->identified(),
                     factor};
}

bool shows_a_height(const InjectionResponse& one) {
  return !one.excluded && one.injection->role == Role::Standard &&
         one.nominal && *one.nominal > 0.0 && one.peak && one.peak->found &&
         !has(one.peak->reasons, "saturated");
}

void add_predicted_noise(const InjectionResponse& one, BlankKind kind,
                         LimitEvidence& evidence) {
  if (!one.peak || !one.response) return;
  if (one.peak->response_noise) {
    evidence.predicted_noise.push_back(
        {one.injection->number, kind,
         *one.peak->response_noise / one.response->divisor});
  } else if (evidence.predicted_noise_absent.empty()) {
    evidence.predicted_noise_absent = one.peak->response_noise_absent;
  }
}

bool is_blank(const InjectionResponse& one, const MeasuredAnalyte& analyte) {
  return blank_kind(one, analyte) && one.peak && one.response;
}

// Mean over the blanks of what their noise predicts.
std::optional<PredictedBias> predicted_bias(const MeasuredAnalyte& analyte) {
  PredictedBias sum;
  double ratios = 0.0;
  double n = 0.0;
  for (const InjectionResponse& one : analyte.injections) {
    if (!is_blank(one, analyte) || !one.peak->baseline_bias) continue;
    const BaselineBias& bias = *one.peak->baseline_bias;
    if (!(bias.blank_sd > 0.0)) continue;
    const double divisor = one.response->divisor;
    sum.blank += bias.blank / divisor;
    sum.blank_error += bias.blank_error / divisor;
    sum.low_peak += bias.low_peak / divisor;
    ratios += bias.low_peak_sd / bias.blank_sd;
    n += 1.0;
  }
  if (!(n > 0.0)) return std::nullopt;
  // The blanks share their random numbers, so that the errors do not average
  // out.
  return PredictedBias{sum.blank / n, sum.blank_error / n, sum.low_peak / n,
                       ratios / n};
}

std::optional<double> median(std::vector<double> values) {
  if (values.empty()) return std::nullopt;
  std::sort(values.begin(), values.end());
  const std::size_t middle = values.size() / 2;
  if (values.size() % 2 == 1) return values[middle];
  return 0.5 * (values[middle - 1] + values[middle]);
}

std::optional<double> noise_near_the_lowest(const MeasuredAnalyte& analyte) {
  std::optional<double> lowest;
  for (const InjectionResponse& one : analyte.injections) {
    if (!shows_a_height(one)) continue;
    if (!lowest || *one.nominal < *lowest) lowest = *one.nominal;
  }
  std::vector<double> noises;
  for (const InjectionResponse& one : analyte.injections) {
    if (shows_a_height(one) && *one.nominal <= kLowRange * *lowest &&
        one.peak->noise) {
      noises.push_back(*one.peak->noise);
    }
  }
  return median(std::move(noises));
}

bool rests_on_blanks(const LimitRow& row) {
  if (row.procedure == "low-level-precision") {
    const std::vector<LimitTerm>& terms = row.estimate->terms;
    return std::any_of(terms.begin(), terms.end(), [](const LimitTerm& term) {
      return term.name == "number of results (blanks)";
    });
  }
  return row.procedure == "blank-deviation" ||
         row.procedure == "blank-and-low-level";
}

}  // namespace

std::optional<BlankKind> blank_kind(const InjectionResponse& one,
                                    const MeasuredAnalyte& analyte) {
  if (one.excluded) return std::nullopt;
  if (holds_surrogate(one, analyte)) return std::nullopt;
  switch (one.injection->role) {
    case Role::SolventBlank:
      return BlankKind::Solvent;
    case Role::MethodBlank:
      return BlankKind::Method;
    case Role::Standard:
      if (one.nominal && *one.nominal == 0.0) return BlankKind::ZeroStandard;
      return std::nullopt;
    case Role::Conditioning:
    case Role::SecondSource:
    case Role::CheckStandard:
    case Role::LowSpike:
    case Role::Control:
    case Role::Fortified:
    case Role::FortifiedDuplicate:
    case Role::Duplicate:
    case Role::AddedStandard:
    case Role::Sample:
      return std::nullopt;
  }
  return std::nullopt;
}

LimitEvidence gather_limit_evidence(const MeasuredAnalyte& analyte,
                                    const Calibration& calibration) {
  LimitEvidence evidence;
  for (const InjectionResponse& one : analyte.injections) {
    const int number = one.injection->number;
    const std::optional<BlankKind> kind = blank_kind(one, analyte);
    if (kind && one.response) {
      evidence.blanks.push_back({number, *kind, one.response->value,
                                 follows_high(analyte, number, calibration),
                                 one.injection->prep});
      add_predicted_noise(one, *kind, evidence);
    }
    const auto spike = spike_result(one, analyte, calibration);
    if (spike) evidence.spikes.push_back(*spike);
    if (shows_a_height(one)) {
      evidence.heights.push_back({number, *one.nominal, one.peak->height});
    }
  }
  evidence.calibration = calibration;
  evidence.noise = noise_near_the_lowest(analyte);
  evidence.noise_measure = analyte.settings->noise_measure;
  evidence.bounds_own = analyte.settings->bounds_own;
  evidence.baseline_biased = analyte.settings->baseline_biased;
  evidence.predicted_bias = predicted_bias(analyte);
  evidence.carry_over_passed = carry_over_passes(analyte, calibration);
  return evidence;
}

void note_mean_internal_standard(const MeasuredAnalyte& analyte,
                                 LimitsOfAnalyte& limits) {
  const auto without =
      std::count_if(analyte.injections.begin(), analyte.injections.end(),
                    [](const InjectionResponse& one) {
                      return one.response && has(one.response->reasons,
                                                 "mean-internal-standard");
                    });
  if (without == 0) return;
  for (LimitRow& row : limits.rows) {
    if (!row.estimate || !rests_on_blanks(row)) continue;
    row.estimate.value().findings.push_back(
        {Grade::Note, "mean-internal-standard",
         std::to_string(without) +
             " blanks without internal standard were divided by the "
             "standards' mean internal-standard response"});
  }
}

}  // namespace loqsmith
