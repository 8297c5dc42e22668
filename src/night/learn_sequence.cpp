#include "loqsmith/night/learn_sequence.hpp"

#include <algorithm>
#include <set>
#include <utility>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/night/file_visit.hpp"
#include "loqsmith/night/parallel.hpp"
#include "loqsmith/signal/baseline_bias.hpp"
#include "loqsmith/signal/estimated_baseline.hpp"
#include "loqsmith/signal/typical_noise.hpp"

namespace loqsmith {
namespace {

bool may_teach(Role role) {
  return role == Role::Standard || role == Role::CheckStandard ||
         role == Role::Control;
}

bool is_kept_from_teaching(const Method& method, const Injection& injection,
                           const std::string& target) {
  const auto decisions = method.decisions.find(target);
  return decisions != method.decisions.end() &&
         decisions->second.never_teach.contains(injection.number);
}

// An injection teaches an analyte only where its level holds some of it;
// internal standards are in every one of them.
bool holds_target(const Sheets& sheets, const Injection& injection,
                  const std::string& target) {
  if (is_kept_from_teaching(sheets.method, injection, target)) return false;
  if (sheets.method.internal_standard(target) != nullptr) return true;
  const LevelEntry* entry =
      sheets.sequence.level_entry(injection.level, target);
  return entry != nullptr && entry->concentration > 0.0;
}

const TraceSelector& selector_of(const Method& method,
                                 const TargetSettings& target) {
  return *method.trace(target.trace);
}

// Calls `use` with the trace of each target of each wanted injection.
template <class Wanted, class Use>
void visit_targets(const SequenceFolder& folder, const FileTask& task,
                   const FileVisit& visit,
                   const std::vector<TargetSettings>& targets, Wanted&& wanted,
                   Use&& use) {
  for (const Injection* injection : task.injections) {
    if (!wanted(*injection)) continue;
    for (std::size_t i = 0; i < targets.size(); ++i) {
      try {
        const Trace& trace = select_trace(
            visit.contents, selector_of(folder.sheets.method, targets[i]),
            injection->run, task.file);
        use(*injection, i, trace);
      } catch (const InputError&) {
        // The measuring pass meets the same trace and names the problem.
      }
    }
  }
}

std::vector<FileTask> tasks_with(const Sequence& sequence,
                                 bool (*wanted)(Role)) {
  std::vector<FileTask> tasks = file_tasks(sequence);
  std::erase_if(tasks, [&](const FileTask& task) {
    return std::none_of(
        task.injections.begin(), task.injections.end(),
        [&](const Injection* injection) { return wanted(injection->role); });
  });
  return tasks;
}

struct TeacherSeen {
  std::size_t target = 0;
  TeacherPeak peak;
};

struct FileLesson {
  std::string sha256;
  std::vector<TeacherSeen> seen;
};

FileLesson learn_from_file(const SequenceFolder& folder, const FileTask& task,
                           const std::vector<TargetSettings>& targets) {
  const FileVisit visit = visit_file(folder, task.file);
  FileLesson lesson{visit.input.sha256, {}};
  if (!visit.problems.empty()) return lesson;
  visit_targets(
      folder, task, visit, targets,
      [](const Injection& injection) { return may_teach(injection.role); },
      [&](const Injection& injection, std::size_t target, const Trace& trace) {
        if (!holds_target(folder.sheets, injection,
                          targets[target].substance())) {
          return;
        }
        const Outcome<TeacherPeak> peak = observe_teacher(
            trace, targets[target], injection.number, injection.role);
        if (peak) lesson.seen.push_back({target, *peak});
      });
  return lesson;
}

void learn_windows(const SequenceFolder& folder, unsigned jobs,
                   Learned& learned) {
  const std::vector<FileTask> tasks =
      tasks_with(folder.sheets.sequence, may_teach);
  std::vector<FileLesson> lessons(tasks.size());
  for_each_index(tasks.size(), jobs, [&](std::size_t i) {
    lessons[i] = learn_from_file(folder, tasks[i], learned.targets);
  });
  std::vector<std::vector<TeacherPeak>> seen(learned.targets.size());
  for (std::size_t i = 0; i < tasks.size(); ++i) {
    learned.hashes.emplace(tasks[i].file, lessons[i].sha256);
    for (TeacherSeen& teacher : lessons[i].seen) {
      seen[teacher.target].push_back(std::move(teacher.peak));
    }
  }
  for (std::vector<TeacherPeak>& peaks : seen) {
    std::sort(peaks.begin(), peaks.end(),
              [](const TeacherPeak& a, const TeacherPeak& b) {
                return a.injection < b.injection;
              });
    learned.windows.push_back(learn_template(peaks));
  }
}

struct NoiseSeen {
  std::size_t target = 0;
  BlankNoise noise;
};

struct FileNoise {
  std::string sha256;
  std::vector<NoiseSeen> seen;
};

bool is_solvent_blank(Role role) { return role == Role::SolventBlank; }

bool by_template(const TargetSettings& target) {
  return target.integration.response == IntegrationSettings::Response::Template;
}

// The template's weights follow the blanks' noise, whatever noise stands
// beside the results; and an estimated baseline is simulated with it.
bool needs_blanks(const TargetSettings& target) {
  return target.noise.source == NoiseSettings::Source::Blank ||
         by_template(target) || is_estimated(target.integration.baseline);
}

FileNoise noise_of_file(const SequenceFolder& folder, const FileTask& task,
                        const Learned& learned) {
  const FileVisit visit = visit_file(folder, task.file);
  FileNoise file{visit.input.sha256, {}};
  if (!visit.problems.empty()) return file;
  visit_targets(
      folder, task, visit, learned.targets,
      [](const Injection& injection) {
        return is_solvent_blank(injection.role);
      },
      [&](const Injection& injection, std::size_t target, const Trace& trace) {
        const TargetSettings& settings = learned.targets[target];
        const Outcome<WindowTemplate>& window = learned.windows[target];
        if (!window || !needs_blanks(settings)) return;
        const double expected = expected_minutes(*window, injection.number);
        Outcome<NoiseEstimate> noise = measure_noise(
            trace, expected, window->width_half_minutes, settings.noise);
        if (!noise) return;
        file.seen.push_back({target, {injection.number, *noise}});
      });
  return file;
}

void learn_noise(const SequenceFolder& folder, unsigned jobs,
                 Learned& learned) {
  learned.blank_noise.resize(learned.targets.size());
  if (std::none_of(learned.targets.begin(), learned.targets.end(),
                   needs_blanks)) {
    return;
  }
  const std::vector<FileTask> tasks =
      tasks_with(folder.sheets.sequence, is_solvent_blank);
  std::vector<FileNoise> files(tasks.size());
  for_each_index(tasks.size(), jobs, [&](std::size_t i) {
    files[i] = noise_of_file(folder, tasks[i], learned);
  });
  for (std::size_t i = 0; i < tasks.size(); ++i) {
    learned.hashes.emplace(tasks[i].file, files[i].sha256);
    for (NoiseSeen& seen : files[i].seen) {
      learned.blank_noise[seen.target].push_back(std::move(seen.noise));
    }
  }
  for (std::vector<BlankNoise>& blanks : learned.blank_noise) {
    std::sort(blanks.begin(), blanks.end(),
              [](const BlankNoise& a, const BlankNoise& b) {
                return a.injection < b.injection;
              });
  }
}

std::vector<NoiseModel> noise_models(const std::vector<BlankNoise>& blanks) {
  std::vector<NoiseModel> models;
  for (const BlankNoise& blank : blanks) {
    models.push_back(blank.noise.whole ? *blank.noise.whole
                                       : blank.noise.model);
  }
  return models;
}

// One noise model for the weights of the whole sequence: that of the blanks,
// where there are any.
void fix_template_weights(Learned& learned) {
  for (std::size_t i = 0; i < learned.targets.size(); ++i) {
    if (!by_template(learned.targets[i]) || !learned.windows[i]) continue;
    const auto models = noise_models(learned.blank_noise[i]);
    if (models.empty()) continue;
    learned.windows[i].value().weights_noise = typical_noise(models);
  }
}

// Estimated baselines are simulated once with the blanks' noise, and scaled to
// that of each.
void simulate_baselines(unsigned jobs, Learned& learned) {
  learned.simulated_baselines.resize(learned.targets.size());
  for_each_index(learned.targets.size(), jobs, [&](std::size_t i) {
    std::vector<BlankNoise>& blanks = learned.blank_noise[i];
    if (blanks.empty() || !learned.windows[i]) return;
    const NoiseEstimate& any = blanks.front().noise;
    const double step = (any.end_minutes - any.start_minutes) /
                        static_cast<double>(any.points - 1);
    const auto simulated =
        simulate_baseline(learned.targets[i], *learned.windows[i],
                          typical_noise(noise_models(blanks)), step);
    learned.simulated_baselines[i] = simulated;
    if (!simulated) return;
    for (BlankNoise& blank : blanks) {
      blank.noise.simulated_baseline = simulated->scaled_to(blank.noise);
    }
  });
}

}  // namespace

std::vector<TargetSettings> method_targets(const Method& method) {
  std::vector<TargetSettings> targets;
  for (const InternalStandardSettings& standard : method.internal_standards) {
    targets.push_back(standard.target);
  }
  for (const AnalyteSettings& analyte : method.analytes) {
    targets.push_back(analyte.target);
  }
  for (const AnalyteSettings& analyte : method.analytes) {
    if (analyte.second_target) targets.push_back(*analyte.second_target);
  }
  return targets;
}

Learned learn_sequence(const SequenceFolder& folder, unsigned jobs) {
  Learned learned;
  learned.targets = method_targets(folder.sheets.method);
  learn_windows(folder, jobs, learned);
  learn_noise(folder, jobs, learned);
  fix_template_weights(learned);
  simulate_baselines(jobs, learned);
  return learned;
}

const BlankNoise* nearest_blank(const std::vector<BlankNoise>& blanks,
                                int injection) {
  const BlankNoise* earlier = nullptr;
  for (const BlankNoise& blank : blanks) {
    if (blank.injection < injection) earlier = &blank;
    if (blank.injection > injection) {
      return earlier != nullptr ? earlier : &blank;
    }
  }
  return earlier;
}

}  // namespace loqsmith
