#include "loqsmith/night/measure_sequence.hpp"

#include <algorithm>
#include <map>
#include <mutex>
#include <optional>
#include <set>
#include <string>
#include <utility>

#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/input_error.hpp"
#include "loqsmith/night/figure_choice.hpp"
#include "loqsmith/night/file_visit.hpp"
#include "loqsmith/night/parallel.hpp"
#include "loqsmith/signal/measure_peak.hpp"
#include "loqsmith/signal/peak_curve.hpp"
#include "loqsmith/signal/peak_working.hpp"

namespace loqsmith {
namespace {

struct NoiseFor {
  Outcome<NoiseEstimate> noise;
  std::string source;
};

NoiseFor noise_for(const Learned& learned, std::size_t target,
                   const Trace& trace, int injection, double expected) {
  const TargetSettings& settings = learned.targets[target];
  if (settings.noise.source == NoiseSettings::Source::Blank) {
    const BlankNoise* blank =
        nearest_blank(learned.blank_noise[target], injection);
    if (blank != nullptr) {
      return {blank->noise, "blank " + std::to_string(blank->injection)};
    }
  }
  const WindowTemplate& window = *learned.windows[target];
  Outcome<NoiseEstimate> noise = measure_noise_beside(
      trace, expected - window.left_minutes, expected + window.right_minutes,
      window.width_half_minutes, settings.noise);
  if (!noise) return {std::move(noise), "same trace"};
  add_whole_trace_noise(noise.value(), trace, expected - window.left_minutes,
                        expected + window.right_minutes,
                        window.width_half_minutes);
  if (const auto& simulated = learned.simulated_baselines[target]) {
    noise.value().simulated_baseline = simulated->scaled_to(*noise);
  } else {
    add_simulated_baseline(noise.value(), trace, settings, window, expected);
  }
  if (settings.noise.source == NoiseSettings::Source::Blank) {
    noise.value().reasons.emplace_back("noise-from-same-trace");
  }
  return {std::move(noise), "same trace"};
}

// So much beside the feet that a noise stretch around the peak is seen whole.
double shown_widths(const NoiseSettings& settings) {
  return std::clamp(0.5 * settings.span_widths, 4.0, 10.0);
}

// The noise stretch where it lies in this trace: beside its own peak, or where
// a blank gives the noise to others. Elsewhere only the figures.
CurveNoise drawn_noise(const Learned& learned, std::size_t target,
                       const Trace& trace, int injection, double expected,
                       const NoiseFor& noise) {
  const NoiseSettings& settings = learned.targets[target].noise;
  const WindowTemplate& window = *learned.windows[target];
  if (settings.source == NoiseSettings::Source::Blank) {
    for (const BlankNoise& blank : learned.blank_noise[target]) {
      if (blank.injection != injection) continue;
      return curve_noise_around(trace, blank.noise, settings,
                                "blank " + std::to_string(injection));
    }
  }
  if (!noise.noise) return {};
  if (noise.source != "same trace") {
    return curve_noise(*noise.noise, settings, noise.source);
  }
  return curve_noise_beside(trace, expected - window.left_minutes,
                            expected + window.right_minutes,
                            window.width_half_minutes, *noise.noise, settings);
}

// All that is needed while one injection is measured.
class InjectionAtWork {
 public:
  InjectionAtWork(const SequenceFolder& folder, const Learned& learned,
                  FigureChoice& figures, const FileVisit& visit,
                  const Injection& injection)
      : folder_(folder),
        learned_(learned),
        figures_(figures),
        visit_(visit),
        injection_(injection) {
    result_.injection = injection.number;
    result_.fact.injection = injection.number;
  }

  InjectionMeasured measure() {
    state_file_facts();
    if (injection_.role == Role::Conditioning) {
      result_.problems = visit_.problems;
      return std::move(result_);
    }
    for (std::size_t i = 0; i < learned_.targets.size(); ++i) {
      result_.signal_units.emplace_back();
      result_.expected_minutes.emplace_back();
      result_.peaks.push_back(measure_target(i));
    }
    result_.fact.data_hash = any_trace_ ? hash_.finish_hex() : std::string{};
    return std::move(result_);
  }

 private:
  void state_file_facts() {
    result_.fact.warnings = visit_.contents.warnings;
    if (!visit_.problems.empty()) {
      result_.fact.problem = describe(visit_.problems.front());
    }
    if (const FileRun* run = run_of(visit_.contents, injection_)) {
      result_.fact.start_time = run->start_time;
      result_.fact.sample_name = run->sample_name;
    }
  }

  Outcome<Peak> measure_target(std::size_t index) {
    const TargetSettings& target = learned_.targets[index];
    if (!visit_.problems.empty()) {
      if (result_.problems.empty()) result_.problems = visit_.problems;
      return NotApplicable{"file-refused: " + result_.fact.problem};
    }
    const Trace* trace = find_trace(target.trace);
    if (trace != nullptr) {
      result_.signal_units.back() = trace->header.signal_unit;
    }
    if (trace == nullptr) {
      return NotApplicable{"trace-missing: " + trace_problem_[target.trace]};
    }
    const Outcome<WindowTemplate>& window = learned_.windows[index];
    if (!window) return NotApplicable{"not-learned: " + window.reason()};
    const double expected = expected_minutes(*window, injection_.number) +
                            shift_for(target.substance());
    result_.expected_minutes.back() = expected;
    const NoiseFor noise =
        noise_for(learned_, index, *trace, injection_.number, expected);
    Outcome<Peak> peak =
        measure_peak(*trace, target, *window, expected, noise.noise,
                     noise.source, bounds_by_hand(target.id));
    if (peak) {
      note_shift(target.id, *peak, expected);
      draw(index, *trace, expected, noise, *peak);
    }
    return peak;
  }

  const Trace* find_trace(const std::string& id) {
    if (const auto known = traces_.find(id); known != traces_.end()) {
      return known->second;
    }
    const Trace* trace = nullptr;
    try {
      trace = &select_trace(visit_.contents, *folder_.sheets.method.trace(id),
                            injection_.run, visit_.input.path);
      add_to_hash(*trace);
      for (const std::string& warning : trace->warnings) {
        result_.fact.warnings.push_back("trace " + id + ": " + warning);
      }
    } catch (const InputError& error) {
      result_.problems.insert(result_.problems.end(), error.problems().begin(),
                              error.problems().end());
      trace_problem_[id] = describe(error.problems().front());
      if (result_.fact.problem.empty()) {
        result_.fact.problem = trace_problem_[id];
      }
    }
    traces_[id] = trace;
    return trace;
  }

  void add_to_hash(const Trace& trace) {
    const auto add = [&](const std::vector<double>& values) {
      hash_.add({reinterpret_cast<const char*>(values.data()),
                 values.size() * sizeof(double)});
    };
    add(trace.minutes);
    add(trace.signal);
    any_trace_ = true;
  }

  std::optional<ManualBounds> bounds_by_hand(const std::string& target) const {
    const auto& decisions = folder_.sheets.method.decisions;
    const auto own = decisions.find(target);
    if (own == decisions.end()) return std::nullopt;
    const auto bounds = own->second.bounds.find(injection_.number);
    if (bounds == own->second.bounds.end()) return std::nullopt;
    return bounds->second;
  }

  // The shift of this injection's own internal standard, for its analytes.
  double shift_for(const std::string& target) const {
    for (const AnalyteSettings& analyte : folder_.sheets.method.analytes) {
      if (analyte.target.id != target) continue;
      const auto shift = standard_shift_.find(analyte.internal_standard);
      return shift == standard_shift_.end() ? 0.0 : shift->second;
    }
    return 0.0;
  }

  void note_shift(const std::string& target, const Peak& peak,
                  double expected) {
    if (peak.found &&
        folder_.sheets.method.internal_standard(target) != nullptr) {
      standard_shift_[target] = peak.retention_minutes - expected;
    }
  }

  // Measured once more for the few that are drawn, with the working kept.
  void draw(std::size_t index, const Trace& trace, double expected,
            const NoiseFor& noise, const Peak& peak) {
    const TargetSettings& target = learned_.targets[index];
    std::string caption = figures_.caption(target.id, injection_.number);
    const bool analyte =
        folder_.sheets.method.internal_standard(target.id) == nullptr;
    if (caption.empty() && peak.found && analyte) {
      caption =
          figures_.claim_parted(target.id, injection_.number, peak.overlap);
    }
    if (caption.empty()) return;
    const WindowTemplate& window = *learned_.windows[index];
    const WorkedPeak worked =
        measure_peak_with_working(trace, target, window, expected, noise.noise,
                                  noise.source, bounds_by_hand(target.id));
    if (!worked.peak) return;
    PeakCurve curve = peak_curve(*worked.peak, worked.working, window,
                                 shown_widths(target.noise));
    curve.noise =
        drawn_noise(learned_, index, trace, injection_.number, expected, noise);
    result_.curves.push_back({.analyte = target.id,
                              .injection = injection_.number,
                              .caption = caption,
                              .peak = *worked.peak,
                              .curve = std::move(curve),
                              .signal_unit = trace.header.signal_unit});
  }

  const SequenceFolder& folder_;
  const Learned& learned_;
  FigureChoice& figures_;
  const FileVisit& visit_;
  const Injection& injection_;
  InjectionMeasured result_;
  std::map<std::string, const Trace*> traces_;
  std::map<std::string, std::string> trace_problem_;
  std::map<std::string, double> standard_shift_;
  Sha256 hash_;
  bool any_trace_ = false;
};

// One figure of each kind for an analyte: of those that were claimed by several
// threads the earliest.
void keep_first_curves(std::vector<InjectionMeasured>& injections) {
  std::set<std::pair<std::string, std::string>> seen;
  for (InjectionMeasured& injection : injections) {
    std::erase_if(injection.curves, [&](const FigureCurve& curve) {
      return !seen.insert({curve.analyte, curve.caption}).second;
    });
  }
}

void refuse_if_changed(FileVisit& visit, const Learned& learned) {
  const auto known = learned.hashes.find(visit.input.path);
  if (known == learned.hashes.end() || known->second == visit.input.sha256) {
    return;
  }
  visit.problems.assign(
      1, {.file = visit.input.path,
          .found = "other contents than a moment before (it changed while it "
                   "was read)",
          .expected = "a finished file",
          .mend = "process the sequence again when nothing writes to it"});
}

}  // namespace

Measured measure_sequence(
    const SequenceFolder& folder, const Learned& learned, unsigned jobs,
    const std::function<void(std::size_t, std::size_t)>& progress) {
  const std::vector<FileTask> tasks = file_tasks(folder.sheets.sequence);
  FigureChoice figures(folder.sheets);
  std::vector<std::vector<InjectionMeasured>> by_file(tasks.size());
  Measured measured;
  measured.inputs.resize(tasks.size());
  std::mutex progress_mutex;
  std::size_t done = 0;
  for_each_index(tasks.size(), jobs, [&](std::size_t i) {
    FileVisit visit = visit_file(folder, tasks[i].file);
    refuse_if_changed(visit, learned);
    for (const Injection* injection : tasks[i].injections) {
      by_file[i].push_back(
          InjectionAtWork(folder, learned, figures, visit, *injection)
              .measure());
    }
    measured.inputs[i] = visit.input;
    const std::lock_guard<std::mutex> guard(progress_mutex);
    ++done;
    if (progress) progress(done, tasks.size());
  });
  for (std::vector<InjectionMeasured>& file : by_file) {
    for (InjectionMeasured& injection : file) {
      measured.injections.push_back(std::move(injection));
    }
  }
  std::sort(measured.injections.begin(), measured.injections.end(),
            [](const InjectionMeasured& a, const InjectionMeasured& b) {
              return a.injection < b.injection;
            });
  keep_first_curves(measured.injections);
  std::sort(
      measured.inputs.begin(), measured.inputs.end(),
      [](const InputFile& a, const InputFile& b) { return a.path < b.path; });
  return measured;
}

}  // namespace loqsmith
