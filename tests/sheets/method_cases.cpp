#include "sheets/method_cases.hpp"

#include "sheets/example.hpp"

namespace loqsmith::test {
namespace {

// The example with one thing changed.
MethodCase changed(const std::string& name, const std::string& from,
                   const std::string& to, std::vector<WantedProblem> problems,
                   const std::string& beyond_schema = "") {
  return {name, replaced(kExampleMethod, from, to), std::move(problems),
          beyond_schema};
}

std::vector<MethodCase> wrong_structure() {
  const std::string xsi =
      R"(xmlns:xsi="http://www.w3.org/2001/XMLSchema-instance" )";
  return {
      changed("unknown element", "<noise ", "<noisy ",
              {{"<noisy", "did you mean \"noise\"?"}}),
      changed("unknown attribute", "baseline=", "base-line=",
              {{"base-line", "did you mean \"baseline\"?"}}),
      changed("unknown attribute of the root", "id=\"well", "name=\"x\" id=\"w",
              {{"name=\"x\"", "one of id, revision in <method>"}}),
      changed("attribute of another namespace", "<title>",
              "<title xml:lang=\"en\">", {{"xml:lang", "\"xml:lang\""}}),
      changed("xsi attribute", "id=\"well",
              xsi + "xsi:schemaLocation=\"urn:loqsmith:method a.xsd\" id=\"w",
              {{"xsi:schemaLocation", "xsi:schemaLocation"}},
              "xsi: attributes"),
      changed("another namespace", "urn:loqsmith:method", "urn:other",
              {{"<method", "urn:loqsmith:method"}}),
      changed("no namespace", " xmlns=\"urn:loqsmith:method\"", "",
              {{"<method", "urn:loqsmith:method"}}),
      changed("foreign element", "<title>", "<x:y xmlns:x=\"urn:x\"/><title>",
              {{"<x:y", "urn:x"}}),
      changed("text between elements", "  <title>", "  stray <title>",
              {{"stray", "no text in <method>"}}),
      changed("element in an empty one", "span=\"5\"/>",
              "span=\"5\"><span/></noise>",
              {{"<span/>", "nothing in <noise>"}}),
      changed("second title", "<units ", "<title>B</title><units ",
              {{"<title>B", "at most one"}}),
      changed("no id", " id=\"well-water-herbicides\"", "",
              {{"<method", "the attribute id"}}),
      changed("no units", "<units concentration=\"ug/L\" result=\"ug/L\"/>", "",
              {{"<method", "expected <units>"}}),
      changed("no retention time", "retention-time=\"3.42\" ", "",
              {{"<analyte id=\"sim", "the attribute retention-time"}}),
      changed("nothing in internal-standards",
              R"(<internal-standard id="is1" trace="uv220" )"
              R"(retention-time="5.10" window="0.20" concentration="50"/>)",
              "",
              {{"<internal-standards>", "expected <internal-standard>"},
               {"internal-standard=", "add it there"}}),
  };
}

std::vector<MethodCase> wrong_values() {
  const auto threshold = [](const std::string& value, const std::string& words,
                            const std::string& beyond = "") {
    return changed("threshold " + value, "<integration ",
                   "<integration threshold=\"" + value + "\" ",
                   {{"threshold=", words}}, beyond);
  };
  const auto reporting = [](const std::string& attribute) {
    return changed(attribute, "significant-digits=\"3\"", attribute,
                   {{attribute, "whole number from"}});
  };
  const auto recovery = [](const std::string& value,
                           const std::string& beyond = "") {
    return changed("recovery " + value, "recovery=\"85 115\"",
                   "recovery=\"" + value + '"',
                   {{"recovery=", "two numbers from 0 up"}}, beyond);
  };
  return {
      threshold("", "a number from 0 up"),
      threshold("abc", "found threshold=\"abc\""),
      threshold("4,5", "decimal point"),
      threshold("4 5", "a number from 0 up"),
      threshold("NaN", "a number from 0 up"),
      threshold("INF", "a number from 0 up"),
      threshold("+5", "plus sign"),
      threshold("0x10", "a number from 0 up"),
      threshold("-1", "a number from 0 up"),
      threshold("1e999", "a number from 0 up", "numbers beyond a double"),
      changed("window 0", "window=\"0.20\"", "window=\"0\"",
              {{"window=\"0\"", "a number above 0"}}),
      changed("r2 above 1", "0.990", "1.01",
              {{"minimum-r2", "a number from 0 to 1"}}),
      reporting("significant-digits=\"0\""),
      reporting("significant-digits=\"16\""),
      reporting("significant-digits=\"3.0\""),
      reporting("significant-digits=\"+3\""),
      reporting("decimals=\"99999999999999999999\""),
      changed("reporting limit 0", "<reporting ",
              "<reporting reporting-limit=\"0\" ",
              {{"reporting-limit=", "a number above 0"}}),
      changed("negative uncertainty", "<reporting ",
              "<reporting relative-uncertainty=\"-5\" ",
              {{"relative-uncertainty=", "a number above 0"}}),
      changed("recovery correction", "<reporting ",
              "<reporting recovery-correction=\"measured\" ",
              {{"recovery-correction=", "expected \"none\""}}),
      changed("even smoothing", "<integration ",
              "<integration smoothing-points=\"4\" ",
              {{"smoothing-points", "0 or an odd number"}}),
      recovery("85"),
      recovery("85 115 120"),
      recovery("85;115"),
      recovery("-5 115"),
      recovery("115 85", "order of a pair"),
      changed("up-to below 1", "<calibration-residual ",
              "<calibration-residual up-to=\"0.5\" ",
              {{"up-to", "\"all\" or a number from 1 up"}}),
      changed("up-to as a word", "<calibration-residual ",
              "<calibration-residual up-to=\"every\" ",
              {{"up-to", "\"all\" or a number from 1 up"}}),
      changed("misspelt word", "response=\"area\"", "response=\"aera\"",
              {{"response", "did you mean \"area\"?"}}),
      changed("blank around a word", "response=\"area\"", "response=\" area\"",
              {{"response", "did you mean \"area\"?"}}),
      changed("empty id", "id=\"simazine\"", "id=\"\"",
              {{"id=\"\"", "a name"}}),
      changed("blank at the end of an id", "id=\"simazine\"",
              "id=\"simazine \"", {{"id=\"simazine \"", "no blanks"}}),
      changed("tab inside an id", "id=\"simazine\"", "id=\"a&#9;b\"",
              {{"id=\"a&#9;b\"", "one line"}}),
      changed("too few blanks wanted", "<limits ", "<limits minimum=\"2\" ",
              {{"minimum=\"2\"", "a whole number from 3"}}),
      changed("established without quantitation", "<blank-deviation ",
              "<established detection=\"1\"/><blank-deviation ",
              {{"<established", "the attribute quantitation"}}),
  };
}

std::vector<MethodCase> broken_identities() {
  return {
      changed("trace twice", "id=\"diuron\"", "id=\"uv220\"",
              {{"id=\"uv220\" kind=\"srm\"", "it stands in line 5 already"}}),
      changed("analyte twice", "id=\"atrazine\"", "id=\"simazine\"",
              {{"id=\"simazine\" trace=\"uv220\" retention-time=\"4.36\"",
                "a second time"}}),
      changed("analyte named as an internal standard", "id=\"simazine\"",
              "id=\"is1\"",
              {{"id=\"is1\" trace=\"uv220\" retention-time=\"5.10\"",
                "a second time"}}),
      changed("unknown trace", "id=\"simazine\" trace=\"uv220\"",
              "id=\"simazine\" trace=\"uv22\"",
              {{"trace=\"uv22\"", "did you mean \"uv220\"?"}}),
      changed("unknown internal standard", "internal-standard=\"is1\"",
              "internal-standard=\"is2\"",
              {{"internal-standard=\"is2\"", "did you mean \"is1\"?"}}),
      changed("letter twice", "rounding=\"half-even\"/>",
              "><letter status=\"estimated\" code=\"a\"/>"
              "<letter status=\"estimated\" code=\"b\"/></reporting>",
              {{"status=\"estimated\" code=\"b\"", "a second time"}}),
  };
}

std::vector<MethodCase> broken_rules() {
  const std::string exclusive = "exclusive attributes";
  const std::string limits = "procedures of the limits";
  const std::string procedures =
      kExampleMethod.substr(kExampleMethod.find("<blank-deviation"),
                            kExampleMethod.find("</limits>") -
                                kExampleMethod.find("<blank-deviation"));
  return {
      changed("both tolerances", "tolerance=\"0.3\"",
              "tolerance=\"0.3\" tolerance-ppm=\"5\"",
              {{"tolerance-ppm", "only one of tolerance, tolerance-ppm"}},
              exclusive),
      changed("digits and decimals", "significant-digits=\"3\"",
              "significant-digits=\"3\" decimals=\"1\"",
              {{"decimals", "only one of"}}, exclusive),
      changed("one preparation unit", "result=\"ug/L\"",
              "result=\"ug/L\" factor=\"1\" sample-amount=\"g\"",
              {{"sample-amount", "all of sample-amount, final-volume"}},
              "attributes that belong together"),
      changed("units differ", "result=\"ug/L\"", "result=\"mg/kg\"",
              {{"result=\"mg/kg\"", "the attribute factor"}},
              "units that demand a factor"),
      changed("governing is absent", "governing=\"blank-deviation\"",
              "governing=\"established\"",
              {{"governing", "add <established> to the limits"}}, limits),
      changed("no procedure", procedures, "",
              {{"<limits", "at least one limit procedure"}}, limits),
      changed("established limit without established", "<check-standard ",
              "<established-limit procedure=\"blank-deviation\"/>"
              "<check-standard ",
              {{"<established-limit", "add <established> to the limits"}},
              limits),
      {"established limit against a procedure that is not computed",
       replaced(replaced(kExampleMethod, "<calibration-residual ",
                         "<established detection=\"1\" quantitation=\"3\"/>"
                         "<calibration-residual "),
                "<check-standard ",
                "<established-limit procedure=\"spike-replicates\"/>"
                "<check-standard "),
       {{"<established-limit", "add <spike-replicates> to the limits"}},
       limits},
      changed("critical value", "<limits ",
              "<limits decision=\"critical-value\" ",
              {{"decision", "has no critical value"}}, limits),
      {"no limits",
       replaced(kSmallestMethod, "<limits><blank-deviation/></limits>", ""),
       {{"<analyte ", "add <limits>"}},
       limits},
      changed("order not below points", "<integration ",
              "<integration smoothing-points=\"5\" smoothing-order=\"5\" ",
              {{"smoothing-order", "an order below the number of points"}},
              "order of the smoothing"),
      {"order of an analyte not below the method's points",
       replaced(replaced(kExampleMethod, "<integration ",
                         "<integration smoothing-points=\"3\" "),
                "<calibration model=\"linear\" weight=\"1/x\"/>",
                "<integration smoothing-order=\"4\"/>"),
       {{"smoothing-order", "an order below the number of points"}},
       "order of the smoothing"},
      changed("estimated baseline below a fit",
              "baseline=\"valley\" overlap=\"drop\"",
              "baseline=\"snip\" overlap=\"model\"",
              {{"baseline", "\"model\" has a straight baseline of its own"}},
              "estimated baselines"),
      changed("own bounds for a learned shape", "response=\"area\"",
              "response=\"template\" bounds=\"own\"",
              {{"bounds", "since the learned shape spans it"}}, "own bounds"),
  };
}

std::vector<MethodCase> unavailable() {
  const auto later = [](const std::string& name, const std::string& from,
                        const std::string& to, const std::string& at,
                        const std::string& words) {
    return changed(name, from, to, {{at, words}},
                   "what is not available in this version");
  };
  return {
      later("extracted trace", "kind=\"srm\"", "kind=\"extracted\"",
            "kind=\"extracted\"", "not available in this version"),
  };
}

std::vector<MethodCase> malformed() {
  return {
      {"nothing", "", {{"", ""}}, ""},
      {"no XML", "id=1", {{"", ""}}, ""},
      {"cut off",
       kExampleMethod.substr(0, kExampleMethod.size() - 4),
       {{"", ""}},
       ""},
      {"two roots", kSmallestMethod + "<a/>", {{"", ""}}, ""},
      changed("attribute twice", "id=\"diuron\"", "id=\"a\" id=\"b\"",
              {{"", ""}}),
      changed("unknown entity", "Herbicides", "&herb;", {{"", ""}}),
      {"document type",
       "<!DOCTYPE method>\n" + kSmallestMethod,
       {{"", "DOCTYPE"}},
       "DOCTYPE"},
      {"another encoding",
       "<?xml version=\"1.0\" encoding=\"ISO-8859-1\"?>\n" + kSmallestMethod,
       {{"", "ISO-8859-1"}},
       "other encodings"},
  };
}

}  // namespace

std::vector<MethodCase> good_methods() {
  std::vector<MethodCase> all{
      {"example", kExampleMethod, {}, ""},
      {"smallest", kSmallestMethod, {}, ""},
      changed("blanks around a number", "window=\"0.20\"", "window=\" .2 \"",
              {}),
      changed("exponent", "window=\"0.20\"", "window=\"2e-1\"", {}),
      changed("all standards", "<calibration-residual ",
              "<calibration-residual up-to=\"all\" ", {}),
      changed("units with a factor", "result=\"ug/L\"",
              "result=\"mg/kg\" factor=\"0.001\" sample-amount=\"g\" "
              "final-volume=\"mL\"",
              {}),
      changed("white space in an empty element", "span=\"5\"/>",
              "span=\"5\">\n  <!-- none -->\n  </noise>", {},
              "white space in an empty element"),
      changed("spaces between the numbers of a pair", "85 115",
              " 85&#10;  115 ", {}),
  };
  std::string shuffled = replaced(kExampleMethod, "</method>", "");
  shuffled = replaced(
      shuffled, "  <units concentration=\"ug/L\" result=\"ug/L\"/>\n", "");
  shuffled += "<units result=\"ug/L\" concentration=\"ug/L\"/></method>";
  all.push_back({"other order", shuffled, {}, ""});
  return all;
}

std::vector<MethodCase> bad_methods() {
  std::vector<MethodCase> all;
  for (auto* part : {wrong_structure, wrong_values, broken_identities,
                     broken_rules, unavailable, malformed}) {
    for (MethodCase& one : part()) all.push_back(std::move(one));
  }
  return all;
}

}  // namespace loqsmith::test
