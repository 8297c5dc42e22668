#include "loqsmith/night/process_sequence.hpp"

#include <algorithm>
#include <iterator>
#include <optional>
#include <utility>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/judgement/judge_analyte.hpp"
#include "loqsmith/ledger/method_seen.hpp"
#include "loqsmith/ledger/publication.hpp"
#include "loqsmith/night/automatic_results.hpp"
#include "loqsmith/night/build_info.hpp"
#include "loqsmith/night/earlier_runs.hpp"
#include "loqsmith/night/folder_state.hpp"
#include "loqsmith/night/judge_sequence.hpp"
#include "loqsmith/night/learn_sequence.hpp"
#include "loqsmith/night/measure_sequence.hpp"
#include "loqsmith/night/sequence_folder.hpp"
#include "loqsmith/night/stage_run.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;
using Detail = std::vector<std::pair<std::string, std::string>>;

// The sequence folder is read only, so OUT may not lie in it.
void refuse_out_inside(const fs::path& folder, const fs::path& out) {
  const fs::path real_out = fs::weakly_canonical(out);
  const auto [end, unused] = std::mismatch(folder.begin(), folder.end(),
                                           real_out.begin(), real_out.end());
  if (end == folder.end()) {
    throw Halt(ExitStatus::WrongUse,
               out.string() +
                   " lies in the sequence folder, which is only "
                   "read; name another place with --out");
  }
}

std::string name_of(const ProcessOptions& options) {
  if (!options.as.empty()) return options.as;
  const fs::path real = fs::weakly_canonical(options.folder);
  return real.filename().string();
}

SequenceFacts facts_of(const SequenceFolder& folder, const Measured& measured) {
  SequenceFacts facts;
  facts.unlisted_files = folder.unlisted_files;
  for (const InjectionMeasured& injection : measured.injections) {
    facts.files.push_back(injection.fact);
  }
  return facts;
}

// Everything that was found, in the shape in which it is published.
PublishedRun assemble(const SequenceFolder& folder, const Learned& learned,
                      Measured measured,
                      std::vector<AnalyteJudgement> analytes) {
  PublishedRun run;
  run.amendments = folder.sheets.amendments;
  run.sequence = folder.sheets.sequence;
  run.method = folder.sheets.method;
  run.inputs = folder.sheet_files;
  run.inputs.insert(run.inputs.end(), measured.inputs.begin(),
                    measured.inputs.end());
  for (std::size_t i = 0; i < learned.targets.size(); ++i) {
    TargetRecord target{learned.targets[i].id, learned.windows[i]};
    for (const BlankNoise& blank : learned.blank_noise[i]) {
      target.blank_noise.emplace_back(blank.injection, blank.noise);
    }
    run.targets.push_back(std::move(target));
  }
  run.analytes = std::move(analytes);
  run.sequence_checks =
      always_checked(folder.sheets.sequence, facts_of(folder, measured));
  for (InjectionMeasured& injection : measured.injections) {
    for (std::size_t i = 0; i < injection.peaks.size(); ++i) {
      run.peaks.push_back({injection.injection, learned.targets[i].id,
                           std::move(injection.peaks[i])});
    }
    for (InputProblem& problem : injection.problems) {
      run.problems.emplace_back(injection.injection, std::move(problem));
    }
    std::move(injection.curves.begin(), injection.curves.end(),
              std::back_inserter(run.curves));
  }
  return run;
}

std::string sheet_hash(const SequenceFolder& folder, const std::string& name) {
  for (const InputFile& file : folder.sheet_files) {
    if (file.path == name) return file.sha256;
  }
  return {};
}

Detail begun_detail(const SequenceFolder& folder, const std::string& cause) {
  const Method& method = folder.sheets.method;
  Detail detail{
      {"method", method.id},
      {"revision", method.revision},
      {"method_sha256", sheet_hash(folder, "method.xml")},
      {"sequence_sha256", sheet_hash(folder, "sequence.csv")},
      {"levels_sha256", sheet_hash(folder, "levels.csv")},
      {"state", state_of_files(folder.path, files_of(folder)).listing},
      {"cause", cause}};
  if (folder.texts.amendments_csv) {
    detail.emplace_back("amendments",
                        std::to_string(folder.sheets.amendments.size()));
    detail.emplace_back("amendments_sha256",
                        sheet_hash(folder, "amendments.csv"));
  }
  return detail;
}

// Of the very bytes that were read.
std::string contents_read(const std::vector<InputFile>& inputs) {
  std::vector<std::pair<std::string, std::string>> hashes;
  for (const InputFile& input : inputs) {
    hashes.emplace_back(
        std::filesystem::path(input.path).lexically_normal().generic_string(),
        input.sha256);
  }
  return contents_of(std::move(hashes));
}

void count_results(const PublishedRun& run, ProcessOutcome& outcome) {
  for (const AnalyteJudgement& analyte : run.analytes) {
    for (const ResultRow& row : analyte.results) {
      ++outcome.results_by_status[status_name(row.status)];
    }
  }
}

// "3, 5-9": run order numbers, neighbours drawn together.
std::string number_ranges(const std::vector<int>& numbers) {
  std::string text;
  for (std::size_t i = 0; i < numbers.size();) {
    std::size_t last = i;
    while (last + 1 < numbers.size() &&
           numbers[last + 1] == numbers[last] + 1) {
      ++last;
    }
    text += (text.empty() ? "" : ", ") + std::to_string(numbers[i]);
    if (last > i) text += "-" + std::to_string(numbers[last]);
    i = last + 1;
  }
  return text;
}

// One sentence a problem, however many injections it costs.
void describe_problems(const PublishedRun& run, ProcessOutcome& outcome) {
  std::vector<std::pair<std::string, std::vector<int>>> grouped;
  for (const auto& [injection, problem] : run.problems) {
    const std::string text = describe(problem);
    const auto same =
        std::find_if(grouped.begin(), grouped.end(),
                     [&](const auto& entry) { return entry.first == text; });
    if (same == grouped.end()) {
      grouped.push_back({text, {injection}});
    } else {
      same->second.push_back(injection);
    }
  }
  for (const auto& [text, injections] : grouped) {
    outcome.messages.push_back(
        text + (injections.size() == 1 ? " (injection " : " (injections ") +
        number_ranges(injections) + ")");
  }
}

}  // namespace

ProcessOutcome process_sequence(const ProcessOptions& options) {
  ProcessOutcome outcome;
  const std::string name = name_of(options);
  const SequenceFolder unamended = open_sequence_folder(options.folder, name);
  const SequenceFolder folder = with_amendments(unamended);
  refuse_out_inside(folder.path, options.out);
  const PublicationPlace place{options.out, options.actor, options.clock,
                               options.wait};
  std::vector<RunEvents> earlier;
  const auto consider = [&](const std::vector<RunEvents>& runs) {
    require_earlier_amendments(options.out, runs, folder.sheets.amendments);
    earlier = runs;
  };
  const MethodSeen method{folder.sheets.method.id,
                          folder.sheets.method.revision,
                          folder.texts.method_xml};
  RunAtWork work =
      RunAtWork::begin(place, name, folder.path.string(),
                       begun_detail(folder, options.cause), &method, consider);
  const std::string begun = options.clock();

  const auto start = std::chrono::steady_clock::now();
  const Learned learned = learn_sequence(folder, options.jobs);
  const auto learned_at = std::chrono::steady_clock::now();
  Measured measured =
      measure_sequence(folder, learned, options.jobs, options.progress);
  const auto measured_at = std::chrono::steady_clock::now();

  std::vector<AnalyteJudgement> analytes =
      judge_sequence(folder, learned, measured);
  mark_automatic_results(unamended, learned, measured, options.jobs, analytes);
  PublishedRun run =
      assemble(folder, learned, std::move(measured), std::move(analytes));
  compare_with_earlier(options.out, earlier, run);
  run.run_number = work.run_number();
  run.program_version = program_version();
  run.build = build_description();
  run.processor_class = processor_class();
  run.begun = begun;
  run.finished = options.clock();
  run.ledger_head = describe(work.begun());
  run.signed_before = work.signed_before();
  stage_run(work.staging(), folder, run, options.report);
  const bool person = needs_a_person(run);
  outcome.published = work.publish({{"needs_a_person", person ? "yes" : "no"},
                                    {"contents", contents_read(run.inputs)}},
                                   options.machine_key.get());
  outcome.messages = work.recovered();
  if (!work.signed_before().empty()) {
    outcome.messages.push_back("an earlier run of this sequence is signed: " +
                               work.signed_before());
  }
  outcome.status = person ? ExitStatus::NeedsPerson : ExitStatus::Done;
  count_results(run, outcome);
  describe_problems(run, outcome);
  outcome.learn_seconds = learned_at - start;
  outcome.measure_seconds = measured_at - learned_at;
  outcome.publish_seconds = std::chrono::steady_clock::now() - measured_at;
  return outcome;
}

}  // namespace loqsmith
