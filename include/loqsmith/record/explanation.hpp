#pragma once

#include <string>
#include <vector>

#include "loqsmith/record/read_published.hpp"

namespace loqsmith {

/// One line of a derivation: words, or a step `label: expression = value unit`
/// that a pocket calculator can follow. An expression is made of numbers,
/// + - x / ( ) and sqrt( ); its numbers are those of the published tables, and
/// it gives the value to the last digits of double arithmetic.
struct ExplanationLine {
  std::string label;
  std::string expression = {};  ///< empty: the label says all
  std::string value = {};
  std::string unit = {};
};

/// "file", "peak", "response", "curve", "sample", "limits", "checks",
/// "verdict", in this order.
struct ExplanationSection {
  std::string title;
  std::vector<ExplanationLine> lines;
};

/// How one result came about, from the file to the text that was reported.
std::vector<ExplanationSection> explain_result(const PublishedRecord& record,
                                               const PublishedAnalyte& analyte,
                                               const PublishedResult& result);

// Its parts.
ExplanationSection explain_file(const PublishedRecord& record,
                                const PublishedResult& result);
ExplanationSection explain_peak(const PublishedRecord& record,
                                const PublishedResult& result);
ExplanationSection explain_response(const PublishedRecord& record,
                                    const PublishedResult& result);
ExplanationSection explain_curve(const PublishedAnalyte& analyte,
                                 const PublishedResult& result);
ExplanationSection explain_sample(const PublishedResult& result);
ExplanationSection explain_limits(const PublishedAnalyte& analyte,
                                  const PublishedResult& result);
ExplanationSection explain_checks(const PublishedRecord& record,
                                  const PublishedResult& result);
ExplanationSection explain_verdict(const PublishedResult& result);

/// The expression by which a procedure's terms give its limit; empty where
/// none of the simple ones does, so that no equation is shown that does not
/// hold: then the terms alone say what went into it.
std::string limit_expression(const LimitEstimate& estimate, bool quantitation);

/// A number as it stands in an expression: a negative one in parentheses.
std::string in_expression(double value);

}  // namespace loqsmith
