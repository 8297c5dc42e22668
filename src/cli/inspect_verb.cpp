#include <algorithm>
#include <iostream>
#include <system_error>

#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/files.hpp"
#include "loqsmith/base/input_error.hpp"
#include "loqsmith/base/json_writer.hpp"
#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/cli/options.hpp"
#include "loqsmith/cli/verb.hpp"
#include "loqsmith/formats/chromatogram_file.hpp"

namespace loqsmith {
namespace {

const std::vector<OptionRow>& option_rows() {
  static const std::vector<OptionRow> kRows{
      {"time-unit", "UNIT", "minute or second, for files that state none"},
      {"ignore-checksum", "", "warn of a wrong checksum instead of refusing"},
      {"json", "", "print JSON, one object a file"},
      {"help", "", "this text"},
  };
  return kRows;
}

/// Figures of one trace that let one recognise it.
struct TraceFigures {
  double smallest = 0.0;
  double largest = 0.0;
  double minutes_of_largest = 0.0;
  double sum = 0.0;
  double area = 0.0;  // trapezoids, signal unit x minute
};

TraceFigures figures_of(const Trace& trace) {
  TraceFigures figures;
  for (std::size_t i = 0; i < trace.signal.size(); ++i) {
    const double y = trace.signal[i];
    figures.sum += y;
    if (i == 0 || y < figures.smallest) figures.smallest = y;
    if (i == 0 || y > figures.largest) {
      figures.largest = y;
      figures.minutes_of_largest = trace.minutes[i];
    }
    if (i > 0) {
      figures.area += 0.5 * (y + trace.signal[i - 1]) *
                      (trace.minutes[i] - trace.minutes[i - 1]);
    }
  }
  return figures;
}

std::string mz_text(const TraceHeader& header) {
  std::string text;
  if (header.precursor_mz)
    text += ", precursor " + shortest(*header.precursor_mz);
  if (header.product_mz) text += ", product " + shortest(*header.product_mz);
  return text;
}

void print_trace(const Trace& trace) {
  const TraceHeader& header = trace.header;
  std::cout << "  " << in_quotes(header.id) << ": "
            << trace_kind_name(header.kind) << mz_text(header) << "\n    "
            << trace.minutes.size() << " points";
  if (!trace.minutes.empty()) {
    const TraceFigures figures = figures_of(trace);
    std::cout << " from " << shortest(trace.minutes.front()) << " to "
              << shortest(trace.minutes.back()) << " min (stated in "
              << header.time_unit << ")\n    signal "
              << shortest(figures.smallest) << " to "
              << shortest(figures.largest)
              << (header.signal_unit.empty() ? " (unit not stated)"
                                             : ' ' + header.signal_unit)
              << ", largest at " << shortest(figures.minutes_of_largest)
              << " min; sum " << shortest(figures.sum) << ", area "
              << shortest(figures.area) << " x min";
  }
  std::cout << "\n    " << header.encoding << '\n';
  for (const std::string& warning : trace.warnings) {
    std::cout << "    note: " << warning << '\n';
  }
}

void print_runs(const FileContents& contents) {
  for (const FileRun& run : contents.runs) {
    std::cout << "  run " << in_quotes(run.id);
    if (!run.name.empty() && run.name != run.id) {
      std::cout << ' ' << in_quotes(run.name);
    }
    if (!run.sample_name.empty()) {
      std::cout << ", sample " << in_quotes(run.sample_name);
    }
    if (!run.start_time.empty()) std::cout << ", begun " << run.start_time;
    std::cout << '\n';
  }
}

void print_text(const std::string& name, const std::string& bytes,
                const FileContents& contents) {
  std::cout << name << "\n  " << contents.format << ", " << bytes.size()
            << " bytes, SHA-256 " << sha256_hex(bytes) << '\n';
  print_runs(contents);
  for (const Trace& trace : contents.traces) print_trace(trace);
  for (const RefusedTrace& refused : contents.refused) {
    std::cout << "  " << in_quotes(refused.header.id) << ": refused\n    "
              << describe(refused.problem) << '\n';
  }
  for (const std::string& skipped : contents.skipped) {
    std::cout << "  skipped: " << skipped << '\n';
  }
  for (const std::string& warning : contents.warnings) {
    std::cout << "  note: " << warning << '\n';
  }
}

void json_header(JsonWriter& json, const TraceHeader& header) {
  json.member("id", header.id);
  json.member("run", header.run);
  json.member("kind", trace_kind_name(header.kind));
  json.member("precursor_mz", header.precursor_mz);
  json.member("product_mz", header.product_mz);
  json.member("time_unit", header.time_unit);
  json.member("signal_unit", header.signal_unit);
  json.member("encoding", header.encoding);
}

void json_trace(JsonWriter& json, const Trace& trace) {
  json.begin_object();
  json_header(json, trace.header);
  json.member("points", static_cast<std::int64_t>(trace.minutes.size()));
  if (!trace.minutes.empty()) {
    const TraceFigures figures = figures_of(trace);
    json.member("first_minutes", trace.minutes.front());
    json.member("last_minutes", trace.minutes.back());
    json.member("smallest_signal", figures.smallest);
    json.member("largest_signal", figures.largest);
    json.member("minutes_of_largest", figures.minutes_of_largest);
    json.member("sum", figures.sum);
    json.member("area_signal_minutes", figures.area);
  }
  json.begin_array("warnings");
  for (const std::string& warning : trace.warnings) json.value(warning);
  json.end_array();
  json.end_object();
}

void json_texts(JsonWriter& json, std::string_view key,
                const std::vector<std::string>& texts) {
  json.begin_array(key);
  for (const std::string& text : texts) json.value(text);
  json.end_array();
}

void print_json(const std::string& name, const std::string& bytes,
                const FileContents& contents) {
  JsonWriter json(std::cout);
  json.begin_object();
  json.member("file", name);
  json.member("format", contents.format);
  json.member("bytes", static_cast<std::int64_t>(bytes.size()));
  json.member("sha256", sha256_hex(bytes));
  json.begin_array("runs");
  for (const FileRun& run : contents.runs) {
    json.begin_object();
    json.member("id", run.id);
    json.member("name", run.name);
    json.member("sample", run.sample_name);
    json.member("begun", run.start_time);
    json.end_object();
  }
  json.end_array();
  json.begin_array("traces");
  for (const Trace& trace : contents.traces) json_trace(json, trace);
  json.end_array();
  json.begin_array("refused");
  for (const RefusedTrace& refused : contents.refused) {
    json.begin_object();
    json_header(json, refused.header);
    json.member("problem", describe(refused.problem));
    json.end_object();
  }
  json.end_array();
  json_texts(json, "skipped", contents.skipped);
  json_texts(json, "warnings", contents.warnings);
  json.end_object();
  std::cout << '\n';
}

ExitStatus inspect_one(const ParsedOptions& parsed, const std::string& name) {
  const ReadPolicy policy{
      .time_unit_if_none = parsed.value("time-unit").value_or(""),
      .checksum_required = !parsed.has("ignore-checksum")};
  try {
    const std::string bytes = read_input_file(name, name);
    const FileContents contents = read_chromatogram_file(bytes, name, policy);
    if (parsed.has("json")) {
      print_json(name, bytes, contents);
    } else {
      print_text(name, bytes, contents);
    }
    return contents.refused.empty() ? ExitStatus::Done
                                    : ExitStatus::NeedsPerson;
  } catch (const InputError& error) {
    std::cerr << error.what() << '\n';
  } catch (const std::system_error& error) {
    std::cerr << name << ": " << error.code().message() << '\n';
  }
  return ExitStatus::BadInput;
}

}  // namespace

ExitStatus inspect_verb(const std::vector<std::string>& arguments) {
  const ParsedOptions parsed = parse_options(option_rows(), arguments);
  if (parsed.has("help")) {
    std::cout << verb_help(
        "loqsmith inspect FILE... [options]",
        "loqsmith inspect well-water-0412/data/inj07.mzML",
        "Shows the traces of an mzML or AnIML file: kind, points, times and\n"
        "units, and why a trace would be refused. Exit status 1 when one is.",
        option_rows());
    return ExitStatus::Done;
  }
  if (parsed.positional.empty()) throw WrongUse("a file is missing");
  const std::string unit = parsed.value("time-unit").value_or("minute");
  if (unit != "minute" && unit != "second") {
    throw WrongUse("--time-unit: expected minute or second, found " +
                   in_quotes(unit));
  }
  ExitStatus worst = ExitStatus::Done;
  for (const std::string& name : parsed.positional) {
    worst = std::max(worst, inspect_one(parsed, name));
  }
  return worst;
}

}  // namespace loqsmith
