#include "loqsmith/formats/animl_steps.hpp"

#include <array>
#include <utility>

#include "loqsmith/base/text.hpp"
#include "loqsmith/formats/start_time.hpp"

namespace loqsmith {
namespace {

// Source: AnIML technique definitions for UV/Vis, mass spectrum time traces and
// chromatography (ASTM E13.15), from memory.
constexpr std::array kDataTypes{
    std::pair{"TIC", TraceKind::Tic},
    std::pair{"BPC", TraceKind::BasePeak},
    std::pair{"XIC", TraceKind::SelectedIon},
    std::pair{"SIM", TraceKind::Sim},
    std::pair{"SRM", TraceKind::Srm},
    std::pair{"MRM", TraceKind::Srm},
    std::pair{"Other", TraceKind::Other},
};

// Text of the parameter of that name in the category of that name.
std::string parameter(const AnimlNode& result, std::string_view category,
                      std::string_view name, std::string_view document) {
  for (const AnimlNode& group : result.children) {
    if (group.name != "Category" || group.text_of("name") != category) continue;
    for (const AnimlNode& child : group.children) {
      if (child.name != "Parameter" || child.text_of("name") != name ||
          child.children.empty()) {
        continue;
      }
      std::string storage;
      return collapsed(
          joined_text(child.children.front().text, document, storage));
    }
  }
  return {};
}

TraceKind kind_of(const AnimlNode& result, std::string_view document) {
  const std::string name = result.text_of("name");
  if (name == "UV/Vis Trace") return TraceKind::Absorption;
  if (name == "Mass Chromatogram") {
    const std::string type =
        parameter(result, "Data Description", "Data Type", document);
    for (const auto& [word, kind] : kDataTypes) {
      if (type == word) return kind;
    }
    return TraceKind::Unknown;
  }
  return name.ends_with(" Trace") ? TraceKind::Other : TraceKind::Unknown;
}

}  // namespace

void AnimlSteps::walk() {
  if (const AnimlNode* samples = tree_.root().child("SampleSet")) {
    read_samples(*samples);
  }
  if (const AnimlNode* steps = tree_.root().child("ExperimentStepSet")) {
    walk_steps(*steps, Place{}, true);
  }
  check_references();
}

void AnimlSteps::read_samples(const AnimlNode& samples) {
  for (const AnimlNode& sample : samples.children) {
    const std::string* id = sample.attribute("sampleID");
    if (id == nullptr) {
      tree_.notes().add("a sample without sampleID");
    } else if (!samples_.emplace(*id, sample.text_of("name")).second) {
      throw InputError(source_.problem(
          sample.offset, "a second sample with the sampleID " + in_quotes(*id),
          "each sampleID once"));
    }
  }
}

void AnimlSteps::walk_steps(const AnimlNode& steps, const Place& outer,
                            bool outermost) {
  for (const AnimlNode& step : steps.children) {
    walk_step(step, outer, outermost);
  }
}

void AnimlSteps::walk_step(const AnimlNode& step, Place place, bool outermost) {
  source_.places.pass(step.offset);
  const std::string id = step.text_of("experimentStepID");
  const std::string name = step.text_of("name");
  if (id.empty()) {
    place.fault = source_.problem(step.offset,
                                  "an experiment step without experimentStepID",
                                  "an experimentStepID");
  } else if (!step_ids_.insert(id).second) {
    throw InputError(source_.problem(
        step.offset, "a second step with the experimentStepID " + in_quotes(id),
        "each experimentStepID once"));
  }
  if (outermost) {
    runs_.push_back({id, name, "", "", {}});
  } else {
    place.steps.push_back(runs_.back().steps.size());
    runs_.back().steps.push_back({id, name, {}});
  }
  place.names.push_back(id);
  place.names.push_back(name);
  if (const AnimlNode* infrastructure = step.child("Infrastructure")) {
    read_infrastructure(*infrastructure, place);
  }
  for (const AnimlNode& result : step.children) {
    if (result.name != "Result") continue;
    Place inside = place;
    inside.path = id + "/" + result.text_of("name");
    inside.names.push_back(result.text_of("name"));
    inside.kind = kind_of(result, source_.bytes);
    walk_holder(result, inside);
    const AnimlNode* steps = result.child("ExperimentStepSet");
    if (steps != nullptr) walk_steps(*steps, place, false);
  }
}

void AnimlSteps::read_infrastructure(const AnimlNode& infrastructure,
                                     Place& place) {
  FileRun& run = runs_.back();
  for (const AnimlNode& child : infrastructure.children) {
    if (child.name == "SampleReferenceSet") {
      read_sample(child, place);
    } else if (child.name == "ExperimentDataReferenceSet") {
      for (const AnimlNode& reference : child.children) {
        if (reference.name != "ExperimentDataReference") continue;
        referenced_steps_.insert(reference.text_of("experimentStepID"));
      }
    } else if (child.name == "Timestamp" && run.start_time.empty()) {
      std::string storage;
      run.start_time =
          collapsed(joined_text(child.text, source_.bytes, storage));
      if (auto warning = start_time_warning(run.start_time)) {
        tree_.notes().add(in_quotes(run.id) + ": " + *warning);
      }
    }
  }
}

// A step may name solvents and products beside what was injected.
void AnimlSteps::read_sample(const AnimlNode& references, Place& place) {
  const AnimlNode* injected = nullptr;
  std::size_t consumed = 0;
  for (const AnimlNode& reference : references.children) {
    if (reference.name != "SampleReference") continue;
    const std::string id = reference.text_of("sampleID");
    if (!samples_.contains(id)) {
      place.fault = source_.problem(
          reference.offset, "a reference to the sample " + in_quotes(id),
          "a sample that stands in the SampleSet");
      continue;
    }
    if (reference.text_of("samplePurpose") != "consumed") continue;
    const bool is_test = reference.text_of("role").starts_with("Test Sample");
    if (consumed++ == 0 || is_test) injected = &reference;
    if (is_test) break;
  }
  if (injected == nullptr) return;
  const bool sure =
      consumed == 1 || injected->text_of("role").starts_with("Test Sample");
  std::string& name = runs_.back().sample_name;
  if (sure && name.empty()) {
    name = samples_.find(injected->text_of("sampleID"))->second;
  }
}

void AnimlSteps::walk_holder(const AnimlNode& holder, const Place& place) {
  for (const AnimlNode& child : holder.children) {
    if (child.name == "SeriesSet") take_set(child, place);
    if (child.name == "Category") walk_holder(child, place);
  }
}

void AnimlSteps::take_set(const AnimlNode& set, const Place& place) {
  source_.places.pass(set.offset);
  AnimlSetTraces found = read_animl_series_set(set, tree_, source_);
  for (std::string& reason : found.skipped) {
    skipped_.push_back(place.path + ", " + std::move(reason));
  }
  FileRun& run = runs_.back();
  for (AnimlTrace& trace : found.traces) {
    TraceHeader& header = trace.header;
    header.id = unique_id(place, header);
    header.run = run.id;
    header.names.insert(header.names.begin(), place.names.begin(),
                        place.names.end());
    header.kind = place.kind;
    if (place.fault) trace.fault = place.fault;
    if (trace.fault) {
      trace.fault->found += " (trace " + in_quotes(header.id) + ")";
    }
    for (const std::size_t step : place.steps) {
      run.steps[step].traces.push_back(header.id);
    }
    traces_.push_back(std::move(trace));
  }
}

std::string AnimlSteps::unique_id(const Place& place,
                                  const TraceHeader& header) {
  const std::string id = place.path + "/" + header.names.back();
  if (trace_ids_.insert(id).second) return id;
  tree_.notes().add("several traces are called " + in_quotes(id) +
                    ": they are numbered in document order");
  std::size_t number = 2;
  std::string numbered = id + " (2)";
  while (!trace_ids_.insert(numbered).second) {
    numbered = id + " (" + std::to_string(++number) + ")";
  }
  return numbered;
}

void AnimlSteps::check_references() {
  for (const std::string& id : referenced_steps_) {
    if (step_ids_.contains(id)) continue;
    tree_.notes().add("experimentStepID " + in_quotes(id) +
                      " refers to nothing in the file");
  }
}

}  // namespace loqsmith
