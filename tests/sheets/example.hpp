#pragma once

#include <string>

namespace loqsmith::test {

/// A whole method that uses what this version computes.
inline const std::string kExampleMethod =
    R"(<method xmlns="urn:loqsmith:method" id="well-water-herbicides" revision="3">
  <title>Herbicides in well water, direct injection</title>
  <units concentration="ug/L" result="ug/L"/>
  <traces>
    <trace id="uv220" kind="absorption" name="220"/>
    <trace id="diuron" kind="srm" precursor="233.1" product="72.1" tolerance="0.3"/>
  </traces>
  <integration response="area" baseline="valley" overlap="drop"/>
  <noise source="blank" measure="half-peak-to-peak" span="5"/>
  <internal-standards>
    <internal-standard id="is1" trace="uv220" retention-time="5.10" window="0.20" concentration="50"/>
  </internal-standards>
  <analytes>
    <analyte id="simazine" trace="uv220" retention-time="3.42" window="0.15"/>
    <analyte id="atrazine" trace="uv220" retention-time="4.36" window="0.15" internal-standard="is1">
      <calibration model="linear" weight="1/x"/>
    </analyte>
  </analytes>
  <calibration model="linear" weight="none" intercept="fitted"/>
  <limits governing="blank-deviation" quantitation-floor="lowest-standard">
    <blank-deviation detection-factor="3" quantitation-factor="10"/>
    <calibration-residual detection-factor="3" quantitation-factor="10"/>
    <signal-to-noise detection-ratio="3" quantitation-ratio="10"/>
  </limits>
  <acceptance>
    <calibration minimum-levels="5" minimum-r2="0.990" back-calculation="15" back-calculation-lowest="20"/>
    <check-standard recovery="85 115"/>
  </acceptance>
  <reporting significant-digits="3" rounding="half-even"/>
</method>
)";

inline const std::string kExampleSequence =
    R"(injection,file,sample,role,level,dilution
1,data/b1.mzML,Blank,solvent-blank,,
2,data/s1.mzML,S1,standard,L1,
3,data/s2.mzML,S2,standard,L2,
4,data/w1.mzML,W-1,sample,,10
)";

inline const std::string kExampleLevels =
    R"(level,analyte,concentration
L1,simazine,0.5
L1,atrazine,0.5
L2,simazine,5
L2,atrazine,5
)";

/// The smallest method there is: everything else is a default.
inline const std::string kSmallestMethod =
    R"(<method xmlns="urn:loqsmith:method" id="m" revision="1">
  <units concentration="ug/L" result="ug/L"/>
  <traces><trace id="t"/></traces>
  <analytes><analyte id="a" trace="t" retention-time="3"/></analytes>
  <limits><blank-deviation/></limits>
</method>
)";

/// `text` with the first `from` replaced; `text` itself where it has none, so
/// that a table row whose pattern is wrong shows as a method that is accepted.
inline std::string replaced(std::string text, const std::string& from,
                            const std::string& to) {
  const std::size_t at = text.find(from);
  if (at != std::string::npos) text.replace(at, from.size(), to);
  return text;
}

}  // namespace loqsmith::test
