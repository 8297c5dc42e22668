#include "loqsmith/sheets/method_schema.hpp"

#include <fstream>
#include <sstream>

#include "loqsmith/base/files.hpp"
#include "sheets/method_cases.hpp"
#include "sheets/vocabulary_documents.hpp"
#include "support/run_program.hpp"
#include "support/temp_folder.hpp"

namespace loqsmith {
namespace {

const std::string kFolder = std::string(LOQSMITH_SOURCE_DIR) + "/schemas/";

struct Document {
  std::string name;
  std::string text;
  bool accepted = false;  ///< by the schema, as it should be
};

// All documents of the tables.
std::vector<Document> documents() {
  std::vector<Document> all;
  for (auto* part : {test::good_methods, test::bad_methods}) {
    for (const auto& one : part()) {
      all.push_back({one.name, one.text,
                     one.problems.empty() == one.beyond_schema.empty()});
    }
  }
  for (const auto& one : test::vocabulary_documents()) {
    all.push_back({one.name, one.text, one.schema_accepts});
  }
  return all;
}

// The verdict of xmllint on each, in one run: "FILE validates".
std::vector<bool> verdicts(const std::vector<Document>& all) {
  const test::TempFolder folder;
  std::vector<std::string> arguments{"--noout", "--nonet", "--schema",
                                     kFolder + "method.xsd"};
  for (std::size_t i = 0; i < all.size(); ++i) {
    const auto path = folder / (std::to_string(i) + ".xml");
    std::ofstream(path, std::ios::binary) << all[i].text;
    arguments.push_back(path.string());
  }
  const test::ProgramRun run = test::run_program(LOQSMITH_XMLLINT, arguments);
  std::vector<bool> accepted;
  for (std::size_t i = 0; i < all.size(); ++i) {
    const auto path = folder / (std::to_string(i) + ".xml");
    accepted.push_back(run.err.find(path.string() + " validates") !=
                       std::string::npos);
  }
  return accepted;
}

TEST(MethodSchema, CommittedFileIsMadeFromTheVocabulary) {
  std::ostringstream schema;
  write_method_schema(schema);
  EXPECT_TRUE(schema.str() == read_file(kFolder + "method.xsd"))
      << "run write_schema > schemas/method.xsd";
}

TEST(MethodSchema, VerdictsAreTheReadersButForWhatIsListed) {
  const std::vector<Document> all = documents();
  const std::vector<bool> accepted = verdicts(all);
  for (std::size_t i = 0; i < all.size(); ++i) {
    EXPECT_EQ(accepted[i], all[i].accepted) << all[i].name << '\n'
                                            << all[i].text;
  }
}

TEST(MethodSchema, DifferencesAreListedBesideIt) {
  const std::string readme = read_file(kFolder + "README.md");
  for (auto* part : {test::good_methods, test::bad_methods}) {
    for (const auto& one : part()) {
      EXPECT_NE(readme.find("**" + one.beyond_schema), std::string::npos)
          << one.name << ": " << one.beyond_schema;
    }
  }
}

}  // namespace
}  // namespace loqsmith
