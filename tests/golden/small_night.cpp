#include "golden/small_night.hpp"

#include <cstddef>
#include <fstream>

#include "loqsmith/base/numbers.hpp"
#include "support/mzml_builder.hpp"
#include "support/simulator.hpp"

namespace loqsmith::test {
namespace {

void write_file(const std::filesystem::path& path, const std::string& text) {
  std::ofstream(path, std::ios::binary) << text;
}

MzmlTrace written(const std::string& id, const Trace& simulated) {
  MzmlTrace trace;
  trace.id = id;
  trace.type = "MS:1000812";
  trace.times = simulated.minutes;
  trace.signal = simulated.signal;
  return trace;
}

std::string document(const SmallNight& night, const SmallInjection& injection,
                     const std::string& name) {
  SimulatedTrace wanted;
  wanted.end_minutes = 6.0;
  wanted.white_noise = night.noise_sd;
  wanted.peaks = {{3.0 + injection.shift_minutes, 0.05, injection.area},
                  {4.5, 0.05, injection.internal_standard_area}};
  std::vector<MzmlTrace> traces{written("uv", simulate_trace(wanted, name))};
  if (night.has_second_trace) {
    wanted.peaks = {
        {3.0 + injection.shift_minutes, 0.05, injection.second_area}};
    traces.push_back(written("fl", simulate_trace(wanted, name + " fl")));
  }
  return mzml_document(traces);
}

}  // namespace

void SmallNight::write(const std::filesystem::path& folder) const {
  std::filesystem::create_directories(folder);
  std::string sheet =
      "injection,file,sample,role,level,parent,dilution,"
      "internal_standard_dilution,prep\n";
  for (std::size_t i = 0; i < injections.size(); ++i) {
    const SmallInjection& one = injections[i];
    const std::string name = "inj-" + std::to_string(i + 1);
    sheet += std::to_string(i + 1) + ',' + name + ".mzML," + one.sample + ',' +
             one.role + ',' + one.level + ',' + one.parent + ',' +
             shortest(one.dilution) + ',' +
             shortest(one.internal_standard_dilution) + ',' + one.prep + '\n';
    write_file(folder / (name + ".mzML"), document(*this, one, name));
  }
  std::string contents = "level,analyte,concentration\n";
  for (const auto& [level, concentration] : levels) {
    contents += level + ",zinol," + shortest(concentration) + '\n';
  }
  write_file(folder / "sequence.csv", sheet);
  write_file(folder / "levels.csv", contents);
  write_file(folder / "method.xml", method);
}

}  // namespace loqsmith::test
