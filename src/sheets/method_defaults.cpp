#include "loqsmith/sheets/method_section.hpp"
#include "loqsmith/sheets/method_settings.hpp"

namespace loqsmith {
namespace {

class DefaultsCollector {
 public:
  explicit DefaultsCollector(const MethodElement& method) : method_(method) {}

  std::vector<DefaultUsed> collect() {
    note_section("units");
    note_section("traces");
    for (const MethodElement* trace : method_.at_path("traces/trace")) {
      note_trace(*trace);
    }
    note_section("integration");
    note_section("noise");
    note_named("internal-standards/internal-standard");
    note_named("analytes/analyte");
    note_section("calibration");
    if (const MethodElement* limits = method_.child("limits")) {
      note_limits(*limits, "");
    }
    note_checks(method_.child("acceptance"), nullptr, "");
    note_section("reporting");
    note_section("amendments");
    for (const MethodElement* analyte : method_.at_path("analytes/analyte")) {
      note_analyte(*analyte);
    }
    return std::move(defaults_);
  }

 private:
  static std::string named(const MethodElement& element) {
    return std::string(element.rule->name) + '[' +
           Section(*element.rule, &element).value("id") + ']';
  }

  void note_section(std::string_view name) {
    Section(element_rule(name), method_.child(name))
        .note_defaults(std::string(name), defaults_);
  }

  void note_named(std::string_view path) {
    for (const MethodElement* element : method_.at_path(path)) {
      Section(*element->rule, element)
          .note_defaults(named(*element), defaults_);
    }
  }

  // A tolerance means nothing where no m/z is stated.
  void note_trace(const MethodElement& trace) {
    std::vector<DefaultUsed> noted;
    Section(*trace.rule, &trace).note_defaults(named(trace), noted);
    const bool states_mz = trace.attribute("precursor") != nullptr ||
                           trace.attribute("product") != nullptr ||
                           trace.attribute("mz") != nullptr;
    for (DefaultUsed& used : noted) {
      if (used.attribute == "tolerance" && !states_mz) continue;
      defaults_.push_back(std::move(used));
    }
  }

  void note_limits(const MethodElement& limits, const std::string& above) {
    const std::string here = above + "limits";
    Section(*limits.rule, &limits).note_defaults(here, defaults_);
    for (DefaultUsed& used : defaults_) {
      if (used.element == here && used.attribute == "governing") {
        used.value = governing_of(limits);
      }
    }
    for (const MethodElement& procedure : limits.children) {
      Section(*procedure.rule, &procedure)
          .note_defaults(here + '/' + std::string(procedure.rule->name),
                         defaults_);
    }
  }

  // The checks of `own` that `shared` does not have: for the others its
  // defaults are noted already.
  void note_checks(const MethodElement* own, const MethodElement* shared,
                   const std::string& above) {
    if (own == nullptr) return;
    for (const MethodElement& check : own->children) {
      const std::string_view name = check.rule->name;
      if (shared != nullptr && shared->child(name) != nullptr) continue;
      Section(*check.rule, &check)
          .note_defaults(above + "acceptance/" + std::string(name), defaults_);
    }
  }

  void note_analyte(const MethodElement& analyte) {
    const std::string above = named(analyte) + '/';
    if (const MethodElement* limits = analyte.child("limits")) {
      note_limits(*limits, above);
    }
    note_checks(analyte.child("acceptance"), method_.child("acceptance"),
                above);
  }

  const MethodElement& method_;
  std::vector<DefaultUsed> defaults_;
};

}  // namespace

std::vector<DefaultUsed> defaults_used(const MethodElement& method) {
  return DefaultsCollector(method).collect();
}

}  // namespace loqsmith
