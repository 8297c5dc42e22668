#include "loqsmith/formats/animl_traces.hpp"

#include <set>
#include <utility>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"

namespace loqsmith {
namespace {

bool says_time(std::string_view name) {
  return name.find("Time") != std::string_view::npos ||
         name.find("time") != std::string_view::npos;
}

// Keeps the first fault only.
void add_fault(std::optional<InputProblem>& fault, InputProblem problem) {
  if (!fault) fault = std::move(problem);
}

class SetReader {
 public:
  SetReader(const AnimlNode& set, const AnimlTree& tree, DocumentSource& source)
      : set_(set), tree_(tree), source_(source) {}

  AnimlSetTraces run() {
    require_ids_once();
    std::vector<const AnimlNode*> independent;
    for (const AnimlNode& series : set_.children) {
      if (series.text_of("dependency") == "independent") {
        independent.push_back(&series);
      }
    }
    if (independent.size() != 1) {
      skip_all(independent.empty() ? "no independent series"
                                   : std::to_string(independent.size()) +
                                         " independent series");
    } else if (take_time(*independent.front())) {
      read_length();
      for (const AnimlNode& series : set_.children) {
        if (&series != independent.front()) take_signal(series);
      }
    }
    return std::move(result_);
  }

 private:
  InputProblem problem(const AnimlNode& node, std::string found,
                       std::string expected) {
    return source_.problem(node.offset, std::move(found), std::move(expected));
  }

  void require_ids_once() {
    std::set<std::string, std::less<>> ids;
    for (const AnimlNode& series : set_.children) {
      const std::string* id = series.attribute("seriesID");
      if (id == nullptr || ids.insert(*id).second) continue;
      throw WholeFileError(
          problem(series, "a second series with the seriesID " + in_quotes(*id),
                  "each seriesID once in its SeriesSet"));
    }
  }

  void skip_all(const std::string& reason) {
    result_.skipped.push_back("series set " + in_quotes(set_.text_of("name")) +
                              ": " + reason);
  }

  void skip(const AnimlNode& series, const std::string& reason) {
    skip_all("series " + in_quotes(series.text_of("name")) + ": " + reason);
  }

  // False where the set holds no traces at all.
  bool take_time(const AnimlNode& series) {
    if (const InputProblem* fault = tree_.fault_of(set_)) time_fault_ = *fault;
    if (const InputProblem* fault = tree_.fault_of(series)) {
      add_fault(time_fault_, *fault);
    }
    const std::string name = series.text_of("name");
    try {
      unit_ = read_animl_time_unit(series, source_);
      if (unit_.stated && !unit_.is_time) {
        skip_all("the independent series " + in_quotes(name) + " in " +
                 in_quotes(unit_.label) + " is no time");
        return false;
      }
      if (!unit_.stated && !says_time(name)) {
        skip_all("the independent series " + in_quotes(name) +
                 " has no unit of time");
        return false;
      }
      if (!unit_.stated) supply_unit(series);
    } catch (const InputError& error) {
      add_fault(time_fault_, error.problems().front());
    }
    time_ = {&series, "time series", NumberType::Float64, true};
    return take_type(time_, time_fault_);
  }

  // A unit is never inferred from the numbers.
  void supply_unit(const AnimlNode& series) {
    const std::string& otherwise = source_.policy.time_unit_if_none;
    if (otherwise == "minute") {
      unit_.unit = {1.0, 1.0, true};
    } else if (otherwise == "second") {
      unit_.unit = {1.0, 60.0, true};
    } else {
      InputProblem fault = problem(series, "no unit on the time series",
                                   "a Unit with the label min or s");
      fault.mend = "state time-unit-if-none in the method";
      throw InputError(std::move(fault));
    }
    unit_.label = otherwise;
    time_warnings_.push_back("no time unit in the file: taken as " + otherwise +
                             ", as the method says");
  }

  // False for a type that is known and no number.
  bool take_type(AnimlSeries& series, std::optional<InputProblem>& fault) {
    const std::string word = series.node->text_of("seriesType");
    const AnimlType* type = animl_type(word);
    if (type == nullptr) {
      add_fault(fault,
                problem(*series.node, "the seriesType " + in_quotes(word),
                        "Int32, Int64, Float32 or Float64"));
      return true;
    }
    if (!type->number) {
      skip(*series.node, "the type " + word + " is no number");
      return false;
    }
    series.type = *type->number;
    return true;
  }

  void read_length() {
    const std::string* written = set_.attribute("length");
    const auto length =
        parse_whole(written == nullptr ? std::string_view() : *written);
    if (length && *length < 0) {
      throw WholeFileError(problem(set_, "the length " + in_quotes(*written),
                                   "a length from 0"));
    }
    if (!length || static_cast<std::size_t>(*length) > kMostPoints) {
      add_fault(
          time_fault_,
          problem(set_,
                  written == nullptr ? "a SeriesSet without length"
                                     : "the length " + in_quotes(*written),
                  "a length up to " + std::to_string(kMostPoints)));
      return;
    }
    length_ = static_cast<std::size_t>(*length);
  }

  void take_signal(const AnimlNode& series) {
    AnimlTrace trace;
    trace.fault = time_fault_;
    if (const InputProblem* fault = tree_.fault_of(series)) {
      add_fault(trace.fault, *fault);
    }
    trace.time = time_;
    trace.signal = {&series, "signal series", NumberType::Float64, false};
    if (!take_type(trace.signal, trace.fault)) return;
    const std::string dependency = series.text_of("dependency");
    if (dependency != "dependent") {
      add_fault(trace.fault,
                problem(series, "the dependency " + in_quotes(dependency),
                        "independent or dependent"));
    }
    require_texts(series, trace.fault);
    trace.warnings = time_warnings_;
    trace.unit = unit_.unit;
    trace.header.names = {set_.text_of("name"), series.text_of("name")};
    trace.header.time_unit = unit_.label;
    trace.header.signal_unit = animl_unit_label(series);
    trace.header.encoding =
        number_type_name(trace.signal.type) + ", " + animl_encoding(series);
    trace.header.points = length_;
    result_.traces.push_back(std::move(trace));
  }

  void require_texts(const AnimlNode& series,
                     std::optional<InputProblem>& fault) {
    for (const std::string_view name : {"name", "seriesID"}) {
      for (const AnimlNode* node : {time_.node, &series}) {
        if (!node->text_of(name).empty()) continue;
        add_fault(fault, problem(*node, "a series without " + std::string(name),
                                 "a " + std::string(name)));
      }
    }
  }

  const AnimlNode& set_;
  const AnimlTree& tree_;
  DocumentSource& source_;
  AnimlTimeUnit unit_;
  AnimlSeries time_;
  std::optional<InputProblem> time_fault_;
  std::vector<std::string> time_warnings_;
  std::size_t length_ = 0;
  AnimlSetTraces result_;
};

}  // namespace

AnimlSetTraces read_animl_series_set(const AnimlNode& set,
                                     const AnimlTree& tree,
                                     DocumentSource& source) {
  return SetReader(set, tree, source).run();
}

}  // namespace loqsmith
