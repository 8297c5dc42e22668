#include "generator/animl_writer.hpp"

#include <array>
#include <charconv>
#include <cstddef>

#include "generator/base64.hpp"
#include "loqsmith/base/numbers.hpp"

namespace loqsmith::test {
namespace {

const Vial& vial_of(const SimulatedNight& night, int injection) {
  return night.vials.at(static_cast<std::size_t>(injection) - 1);
}

std::string shortest_float(double value) {
  std::array<char, 32> buffer{};
  const auto end = std::to_chars(buffer.data(), buffer.data() + buffer.size(),
                                 static_cast<float>(value));
  return {buffer.data(), end.ptr};
}

std::string unit(const std::string& label, const std::string& quantity,
                 const std::string& si) {
  return "<Unit label=\"" + label + "\" quantity=\"" + quantity + "\">" + si +
         "</Unit>";
}

std::string index_range(std::size_t length) {
  return "startIndex=\"0\" endIndex=\"" + std::to_string(length - 1) + "\"";
}

std::string time_values(const Detector& detector, AnimlFile::Times style,
                        std::size_t length) {
  if (style == AnimlFile::Times::Increment) {
    return "<AutoIncrementedValueSet " + index_range(length) +
           "><StartValue><D>0</D></StartValue><Increment><D>" +
           shortest(1.0 / detector.points_per_minute) +
           "</D></Increment></AutoIncrementedValueSet>";
  }
  std::vector<double> times(length);
  const double factor = style == AnimlFile::Times::EncodedSeconds ? 60.0 : 1.0;
  for (std::size_t i = 0; i < length; ++i) {
    times[i] = factor * time_of_point(detector, i);
  }
  if (style == AnimlFile::Times::EncodedSeconds) {
    return "<EncodedValueSet " + index_range(length) + ">" +
           base64_text(packed_doubles(times)) + "</EncodedValueSet>";
  }
  std::string set = "<IndividualValueSet " + index_range(length) + ">";
  for (const double time : times) set += "<D>" + shortest(time) + "</D>";
  return set + "</IndividualValueSet>";
}

std::string time_series(const Detector& detector, AnimlFile::Times style,
                        std::size_t length) {
  const bool seconds = style == AnimlFile::Times::EncodedSeconds;
  return "<Series name=\"Time\" dependency=\"independent\" seriesID=\"time\" "
         "seriesType=\"Float64\" plotScale=\"linear\">" +
         time_values(detector, style, length) +
         (seconds ? unit("s", "Time", "<SIUnit>s</SIUnit>")
                  : unit("min", "Time", "<SIUnit factor=\"60\">s</SIUnit>")) +
         "</Series>";
}

std::string signal_series(const std::vector<double>& signal,
                          AnimlFile::Signal style) {
  std::string set;
  if (style == AnimlFile::Signal::Encoded) {
    set = "<EncodedValueSet " + index_range(signal.size()) + ">" +
          base64_text(packed_floats(signal)) + "</EncodedValueSet>";
  } else {
    set = "<IndividualValueSet " + index_range(signal.size()) + ">";
    for (const double value : signal) {
      set += "<F>" + shortest_float(value) + "</F>";
    }
    set += "</IndividualValueSet>";
  }
  return "<Series name=\"Signal\" dependency=\"dependent\" seriesID=\"signal\" "
         "seriesType=\"Float32\" plotScale=\"linear\">" +
         set +
         unit("pA", "Electric Current", "<SIUnit factor=\"1e-12\">A</SIUnit>") +
         "</Series>";
}

std::string detector_step(const SimulatedNight& night, const Vial& vial,
                          const AnimlFile& file) {
  const std::vector<double> signal = simulate_signal(night, vial);
  return "          <ExperimentStep name=\"FID\" experimentStepID=\"" +
         step_id(vial.number) +
         "-fid\">\n"
         "            <Technique name=\"Flame Ionization Detector\" "
         "uri=\"https://example.invalid/fid-trace.atdd\"/>\n"
         "            <Infrastructure><SampleReferenceSet><SampleInheritance "
         "role=\"Test Sample\" samplePurpose=\"consumed\"/>"
         "</SampleReferenceSet></Infrastructure>\n"
         "            <Result name=\"FID Trace\">\n"
         "              <SeriesSet name=\"FID Trace\" length=\"" +
         std::to_string(signal.size()) + "\">\n                " +
         time_series(night.detector, file.times, signal.size()) +
         "\n                " + signal_series(signal, file.signal) +
         "\n              </SeriesSet>\n            </Result>\n"
         "          </ExperimentStep>\n";
}

std::string injection_step(const SimulatedNight& night, const Vial& vial,
                           const AnimlFile& file) {
  const std::string id = step_id(vial.number);
  return "    <ExperimentStep name=\"Injection " + std::to_string(vial.number) +
         "\" experimentStepID=\"" + id +
         "\">\n"
         "      <Technique name=\"Chromatography\" "
         "uri=\"https://example.invalid/chromatography.atdd\"/>\n"
         "      <Infrastructure><SampleReferenceSet><SampleReference "
         "sampleID=\"vial-" +
         std::to_string(vial.number) +
         "\" role=\"Test Sample\" samplePurpose=\"consumed\"/>"
         "</SampleReferenceSet><Timestamp>" +
         start_time(night, vial) +
         "</Timestamp></Infrastructure>\n"
         "      <Result name=\"Separation Monitoring\">\n"
         "        <ExperimentStepSet>\n" +
         detector_step(night, vial, file) +
         "        </ExperimentStepSet>\n      </Result>\n"
         "    </ExperimentStep>\n";
}

AnimlFile single(const SimulatedNight& night, int injection,
                 AnimlFile::Times times, AnimlFile::Signal signal) {
  return {vial_of(night, injection).file, times, signal, {injection}};
}

}  // namespace

std::string step_id(int injection) {
  return std::string(injection < 10 ? "inj-0" : "inj-") +
         std::to_string(injection);
}

std::vector<AnimlFile> tablet_coating_files(const SimulatedNight& night) {
  using Times = AnimlFile::Times;
  using Signal = AnimlFile::Signal;
  std::vector<AnimlFile> files;
  for (const Vial& vial : night.vials) {
    if (vial.run.empty()) {
      const bool method_blank = vial.role == "method-blank";
      files.push_back(
          single(night, vial.number,
                 method_blank ? Times::IndividualMinutes : Times::Increment,
                 method_blank ? Signal::Individual : Signal::Encoded));
      continue;
    }
    if (files.empty() || files.back().path != vial.file) {
      files.push_back({vial.file, Times::Increment, Signal::Encoded, {}});
      if (vial.file == "data/batch-1.animl") {
        files.back().times = Times::EncodedSeconds;
      }
      if (vial.file == "data/closing.animl") {
        files.back().signal = Signal::Individual;
      }
    }
    files.back().injections.push_back(vial.number);
  }
  return files;
}

std::string animl_document(const SimulatedNight& night, const AnimlFile& file) {
  std::string samples;
  std::string steps;
  for (const int injection : file.injections) {
    const Vial& vial = vial_of(night, injection);
    samples += "    <Sample name=\"" + vial.sample + "\" sampleID=\"vial-" +
               std::to_string(injection) + "\"/>\n";
    steps += injection_step(night, vial, file);
  }
  return "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n"
         "<AnIML xmlns=\"urn:org:astm:animl:schema:core:draft:0.90\" "
         "version=\"0.90\">\n  <SampleSet>\n" +
         samples + "  </SampleSet>\n  <ExperimentStepSet>\n" + steps +
         "  </ExperimentStepSet>\n</AnIML>\n";
}

}  // namespace loqsmith::test
