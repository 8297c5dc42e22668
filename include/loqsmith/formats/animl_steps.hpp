#pragma once

#include <map>
#include <set>
#include <string>
#include <vector>

#include "loqsmith/formats/animl_traces.hpp"

namespace loqsmith {

/// Walks the experiment steps of a document, results and categories at any
/// depth, and says which runs, steps and traces there are. Depth is bounded by
/// the scan that came before.
class AnimlSteps {
 public:
  AnimlSteps(AnimlTree& tree, DocumentSource& source)
      : tree_(tree), source_(source) {}

  /// @throws InputError for a sample or step id given twice, and as
  ///         read_animl_series_set does
  void walk();

  std::vector<FileRun>& runs() { return runs_; }
  std::vector<AnimlTrace>& traces() { return traces_; }
  std::vector<std::string>& skipped() { return skipped_; }

 private:
  /// What is known where the walk stands.
  struct Place {
    std::vector<std::string> names;  ///< of the steps, ids too, and the result
    std::string path;                ///< step id / result
    std::vector<std::size_t> steps;  ///< places in the run's list
    std::optional<InputProblem> fault;
    TraceKind kind = TraceKind::Unknown;
  };

  void read_samples(const AnimlNode& samples);
  void walk_steps(const AnimlNode& steps, const Place& outer, bool outermost);
  void walk_step(const AnimlNode& step, Place place, bool outermost);
  void read_infrastructure(const AnimlNode& infrastructure, Place& place);
  void read_sample(const AnimlNode& references, Place& place);
  void walk_holder(const AnimlNode& holder, const Place& place);
  void take_set(const AnimlNode& set, const Place& place);
  std::string unique_id(const Place& place, const TraceHeader& header);
  void check_references();

  AnimlTree& tree_;
  DocumentSource& source_;
  std::map<std::string, std::string, std::less<>> samples_;  ///< names by id
  std::set<std::string, std::less<>> step_ids_;
  std::set<std::string, std::less<>> referenced_steps_;
  std::set<std::string, std::less<>> trace_ids_;
  std::vector<FileRun> runs_;
  std::vector<AnimlTrace> traces_;
  std::vector<std::string> skipped_;
};

}  // namespace loqsmith
