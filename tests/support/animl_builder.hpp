#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace loqsmith::test {

/// One Series to write: values and unit are XML, so that rules can be broken.
struct AnimlSeriesPlan {
  std::string name = "Intensity";
  std::string dependency = "dependent";
  std::string id = "y";
  std::string type = "Float64";
  std::string values =
      "<IndividualValueSet><D>1</D><D>2</D><D>4</D><D>3</D>"
      "</IndividualValueSet>";
  std::string unit = "<Unit label=\"mAU\"/>";
};

/// The time of a careful writer: 0, 0.5, 1 and 1.5 min, auto-incremented.
AnimlSeriesPlan animl_time();

/// A SeriesSet as XML.
std::string animl_set(const std::vector<AnimlSeriesPlan>& series,
                      std::string_view length = "4",
                      std::string_view name = "UV/Vis Trace");

/// One injection: an outer step of chromatography with one detector's inside.
struct AnimlInjection {
  std::string id = "inj-1";
  std::string name = "Injection 1";
  std::string sample_id = "S-1";
  std::string result = "UV/Vis Trace";  ///< of the detector
  std::string content;                  ///< of that result, XML
};

/// AnIML 0.90 with the samples "blank" (B-1) and "well 3" (S-1). The detector's
/// step has the injection's id with "-uv" behind it.
std::string animl_document(const std::vector<AnimlInjection>& injections);

/// One injection with this in its detector's result.
std::string animl_document(const std::string& content);

/// One injection with a sound trace of four points.
std::string animl_document();

/// The numbers as an EncodedValueSet; `attributes` may state indices. Types as
/// seriesType has them.
std::string animl_encoded(const std::vector<double>& values,
                          std::string_view type,
                          std::string_view attributes = {});

}  // namespace loqsmith::test
