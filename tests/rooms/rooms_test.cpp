// Holds every include, and every link list, to what a room may know.

#include <algorithm>
#include <filesystem>
#include <fstream>
#include <map>
#include <regex>
#include <set>
#include <sstream>

namespace loqsmith::test {
namespace {

namespace fs = std::filesystem;
using Names = std::set<std::string>;

// The map of the house: what each room may include, beside itself.
const std::map<std::string, Names>& knows() {
  static const Names kComputing{"base",     "numerics",    "chromatogram",
                                "signal",   "calibration", "limits",
                                "judgement"};
  static const std::map<std::string, Names> kKnows = [] {
    std::map<std::string, Names> map{
        {"base", {}},
        {"numerics", {"base"}},
        {"chromatogram", {"base"}},
        {"formats", {"base", "chromatogram"}},
        {"signal", {"base", "numerics", "chromatogram"}},
        {"calibration", {"base", "numerics", "chromatogram"}},
        {"limits", {"base", "numerics", "chromatogram", "calibration"}},
        {"ledger", {"base"}},
    };
    map["judgement"] = map["limits"];
    map["judgement"].insert("limits");
    map["sheets"] = kComputing;
    map["record"] = kComputing;
    map["record"].insert("sheets");
    map["night"] = map["record"];
    map["night"].insert({"record", "ledger", "formats"});
    map["cli"] = map["night"];
    map["cli"].insert("night");
    return map;
  }();
  return kKnows;
}

// Heavy or dangerous headers and the rooms whose sources may include them.
const std::vector<std::pair<std::string, Names>>& guarded_headers() {
  static const std::vector<std::pair<std::string, Names>> kGuarded{
      {"Eigen/", {"numerics"}},
      {"boost/math/", {"numerics"}},
      {"boost/program_options", {"cli"}},
      // record reads published runs back, ledger its lines and manifests.
      {"nlohmann/", {"ledger", "record"}},
      {"openssl/", {"base"}},
      {"libdeflate", {"formats"}},
  };
  return kGuarded;
}

struct Include {
  fs::path file;
  std::string room;  // of the file
  bool header = false;
  std::string target;  // what stands between the brackets
};

std::string text_of(const fs::path& path) {
  std::ifstream in(path, std::ios::binary);
  std::ostringstream text;
  text << in.rdbuf();
  return text.str();
}

std::vector<Include> includes_of(const fs::path& path,
                                 const std::string& room) {
  static const std::regex kInclude(R"(^\s*#\s*include\s*[<"]([^>"]+)[>"])");
  std::vector<Include> found;
  std::istringstream lines(text_of(path));
  for (std::string line; std::getline(lines, line);) {
    std::smatch match;
    if (std::regex_search(line, match, kInclude)) {
      found.push_back({path, room, path.extension() == ".hpp", match[1]});
    }
  }
  return found;
}

std::vector<Include> all_includes() {
  std::vector<Include> all;
  const fs::path root(LOQSMITH_SOURCE_DIR);
  for (const fs::path& top : {root / "include" / "loqsmith", root / "src"}) {
    for (const auto& entry : fs::recursive_directory_iterator(top)) {
      const fs::path extension = entry.path().extension();
      if (extension != ".hpp" && extension != ".cpp") continue;
      const std::string room =
          entry.path().lexically_relative(top).begin()->string();
      const std::vector<Include> own = includes_of(entry.path(), room);
      all.insert(all.end(), own.begin(), own.end());
    }
  }
  return all;
}

std::string room_of(const std::string& target) {
  static const std::regex kOurs("^loqsmith/([a-z]+)/");
  std::smatch match;
  return std::regex_search(target, match, kOurs) ? match[1].str()
                                                 : std::string{};
}

TEST(Rooms, EveryRoomIsOnTheMap) {
  for (const auto& entry :
       fs::directory_iterator(fs::path(LOQSMITH_SOURCE_DIR) / "src")) {
    EXPECT_TRUE(knows().contains(entry.path().filename().string()))
        << entry.path();
  }
}

TEST(Rooms, IncludeOnlyWhatTheyMayKnow) {
  const std::vector<Include> includes = all_includes();
  ASSERT_GT(includes.size(), 100U);
  for (const Include& include : includes) {
    const std::string wanted = room_of(include.target);
    if (wanted.empty() || wanted == include.room) continue;
    EXPECT_TRUE(knows().at(include.room).contains(wanted))
        << include.file << " includes " << include.target << ", but the room "
        << include.room << " may not know " << wanted;
  }
}

TEST(Rooms, KeepHeavyHeadersInSourcesOfTheirRooms) {
  for (const Include& include : all_includes()) {
    for (const auto& [prefix, rooms] : guarded_headers()) {
      if (!include.target.starts_with(prefix)) continue;
      EXPECT_FALSE(include.header)
          << include.file << " exposes " << include.target << " to its users";
      EXPECT_TRUE(rooms.contains(include.room))
          << include.file << " includes " << include.target;
    }
  }
}

TEST(Rooms, LinkWhatTheyMayKnow) {
  static const std::regex kKnowsLine(R"(KNOWS ([a-z ]+))");
  for (const auto& [room, known] : knows()) {
    if (room == "cli" || known.empty()) continue;
    const std::string text = text_of(fs::path(LOQSMITH_SOURCE_DIR) / "src" /
                                     room / "CMakeLists.txt");
    std::smatch match;
    ASSERT_TRUE(std::regex_search(text, match, kKnowsLine)) << room;
    std::istringstream words(match[1].str());
    Names linked;
    for (std::string word; words >> word;) linked.insert(word);
    EXPECT_EQ(linked, known) << room;
  }
}

// Two types of one name in one namespace are one type to the linker, which
// then mixes their functions without a word.
TEST(Rooms, NameEveryTypeOnce) {
  static const std::regex kType(R"(^(?:struct|class|enum class) (\w+)[^;]*$)");
  std::map<std::string, fs::path> known;
  for (const auto& entry : fs::recursive_directory_iterator(
           fs::path(LOQSMITH_SOURCE_DIR) / "include")) {
    if (entry.path().extension() != ".hpp") continue;
    std::istringstream lines(text_of(entry.path()));
    for (std::string line; std::getline(lines, line);) {
      std::smatch match;
      if (!std::regex_search(line, match, kType)) continue;
      const auto [first, is_new] = known.emplace(match[1], entry.path());
      EXPECT_TRUE(is_new) << match[1] << " stands in " << first->second
                          << " and in " << entry.path();
    }
  }
  EXPECT_GT(known.size(), 100U);
}

// Standard library names by which a computing room would reach the world.
TEST(Rooms, ComputingRoomsDoNoInputOrOutput) {
  const Names computing{"numerics",    "chromatogram", "signal",
                        "calibration", "limits",       "judgement"};
  const Names forbidden{"iostream", "fstream", "filesystem", "cstdio",
                        "chrono",   "cstdlib", "thread",     "unistd.h",
                        "locale",   "stdio.h"};
  for (const Include& include : all_includes()) {
    if (!computing.contains(include.room)) continue;
    EXPECT_FALSE(forbidden.contains(include.target))
        << include.file << " includes " << include.target;
  }
}

}  // namespace
}  // namespace loqsmith::test
