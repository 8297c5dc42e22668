#include "loqsmith/base/files.hpp"

#include <fcntl.h>
#include <gtest/gtest.h>
#include <sys/stat.h>
#include <sys/wait.h>
#include <unistd.h>

#include <cerrno>
#include <system_error>

#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/file_ops.hpp"
#include "loqsmith/base/input_error.hpp"
#include "support/temp_folder.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;
using test::TempFolder;

// Takes the hook away again whatever a test does.
struct HookGuard {
  explicit HookGuard(FileHook hook) { set_file_hook(std::move(hook)); }
  ~HookGuard() { set_file_hook({}); }
};

int error_of(const std::function<void()>& action) {
  try {
    action();
  } catch (const std::system_error& error) {
    return error.code().value();
  }
  return 0;
}

std::string problem_of(const std::function<void()>& action) {
  try {
    action();
  } catch (const InputError& error) {
    return error.what();
  }
  return {};
}

TEST(Files, WritesNewFilesOnly) {
  const TempFolder folder;
  write_new_file(folder / "a", "one\n");
  EXPECT_EQ(read_file(folder / "a"), "one\n");
  EXPECT_EQ(error_of([&] { write_new_file(folder / "a", "two"); }), EEXIST);
  EXPECT_EQ(read_file(folder / "a"), "one\n");
}

TEST(Files, ReplacesAppendsAndCuts) {
  const TempFolder folder;
  replace_file(folder / "a", "one\n");
  replace_file(folder / "a", "two\n");
  append_to_file(folder / "a", "three\n");
  EXPECT_EQ(read_file(folder / "a"), "two\nthree\n");
  cut_file(folder / "a", 4);
  EXPECT_EQ(read_file(folder / "a"), "two\n");
  append_to_file(folder / "b", std::string(200'000, 'x'));
  EXPECT_EQ(read_file(folder / "b").size(), 200'000U);
  EXPECT_EQ(files_below(folder.path()), (std::vector<std::string>{"a", "b"}));
}

TEST(Files, WritesThroughNoLink) {
  const TempFolder folder;
  write_new_file(folder / "target", "keep");
  fs::create_symlink(folder / "target", folder / "link");
  EXPECT_EQ(error_of([&] { append_to_file(folder / "link", "x"); }), ELOOP);
  fs::create_symlink(folder / "target", folder / "head.new");
  EXPECT_EQ(error_of([&] { replace_file(folder / "head", "x"); }), ELOOP);
  EXPECT_EQ(read_file(folder / "target"), "keep");
}

TEST(Files, NamesThePathInErrors) {
  const TempFolder folder;
  try {
    read_file(folder / "nowhere");
    FAIL();
  } catch (const std::system_error& error) {
    EXPECT_NE(std::string(error.what()).find("nowhere"), std::string::npos);
    EXPECT_EQ(error.code().value(), ENOENT);
  }
}

TEST(Files, RenamesOverNothing) {
  const TempFolder folder;
  fs::create_directory(folder / "from");
  fs::create_directory(folder / "there");
  const auto rename_to = [&](const char* name) {
    return error_of([&] { rename_new(folder / "from", folder / name); });
  };
  EXPECT_EQ(rename_to("there"), EEXIST);
  EXPECT_EQ(rename_to("free"), 0);
  EXPECT_TRUE(fs::is_directory(folder / "free"));
}

TEST(Files, MakesAndRemovesTrees) {
  const TempFolder folder;
  make_folders(folder / "a/b/c");
  make_folders(folder / "a/b/c");
  write_new_file(folder / "a/b/c/file", "x");
  write_new_file(folder / "kept", "y");
  fs::create_symlink(folder / "kept", folder / "a/link");
  fs::create_directory_symlink(folder.path(), folder / "a/up");
  flush_tree(folder / "a");
  EXPECT_EQ(files_below(folder / "a"),
            (std::vector<std::string>{"b/c/file", "link", "up"}));
  remove_tree(folder / "a");
  EXPECT_FALSE(fs::exists(folder / "a"));
  EXPECT_EQ(read_file(folder / "kept"), "y");
  EXPECT_EQ(error_of([&] { make_folders(folder / "kept/below"); }), EEXIST);
}

TEST(Files, ListsInOrderOfBytes) {
  const TempFolder folder;
  for (const char* name : {"b", "B", "a-b", "a", "\xC3\xA4"}) {
    write_new_file(folder / name, "");
  }
  make_folders(folder / "a.d");
  write_new_file(folder / "a.d/z", "");
  EXPECT_EQ(
      files_below(folder.path()),
      (std::vector<std::string>{"B", "a", "a-b", "a.d/z", "b", "\xC3\xA4"}));
}

TEST(Files, DigestsInPiecesWhatIsRegular) {
  const TempFolder folder;
  const std::string bytes(150'000, 'z');
  write_new_file(folder / "a", bytes);
  EXPECT_EQ(digest_file(folder / "a").sha256, sha256_hex(bytes));
  EXPECT_EQ(digest_file(folder / "a").bytes, bytes.size());
  fs::create_symlink(folder / "a", folder / "link");
  EXPECT_EQ(error_of([&] { digest_file(folder / "link"); }), ELOOP);
  ASSERT_EQ(::mkfifo((folder / "fifo").c_str(), 0600), 0);
  EXPECT_EQ(error_of([&] { digest_file(folder / "fifo"); }), EINVAL);
  EXPECT_EQ(error_of([&] { digest_file(folder.path()); }), EINVAL);
}

TEST(ReadInputFile, ReadsRegularFilesAlsoThroughLinks) {
  const TempFolder folder;
  write_new_file(folder / "a", "bytes");
  write_new_file(folder / "empty", "");
  fs::create_symlink("a", folder / "link");
  EXPECT_EQ(read_input_file(folder / "a", "a"), "bytes");
  EXPECT_EQ(read_input_file(folder / "link", "link"), "bytes");
  EXPECT_EQ(read_input_file(folder / "empty", "empty"), "");
  EXPECT_EQ(error_of([&] { read_input_file(folder / "no", "no"); }), ENOENT);
}

TEST(ReadInputFile, RefusesFoldersPipesAndWhatIsTooLarge) {
  const TempFolder folder;
  write_new_file(folder / "a", "12345");
  ASSERT_EQ(::mkfifo((folder / "fifo").c_str(), 0600), 0);
  const auto problem = [&](const char* name, std::uint64_t most) {
    return problem_of([&] { read_input_file(folder / name, "shown", most); });
  };
  EXPECT_EQ(problem("", 100),
            "shown: expected a file, found a folder; name the file inside it");
  EXPECT_NE(problem("fifo", 100).find("found a pipe"), std::string::npos);
  EXPECT_NE(problem("a", 4).find("found 5 bytes"), std::string::npos);
  EXPECT_EQ(problem("a", 5), "");
}

TEST(ReadInputFile, RefusesAFileThatChangesMeanwhile) {
  for (const char* change : {"grow", "cut", "touch"}) {
    const TempFolder folder;
    const fs::path file = folder / "a";
    write_new_file(file, "12345");
    bool changed = false;
    const HookGuard guard([&](FileOperation operation, const fs::path&) {
      if (operation == FileOperation::Read && !changed) {
        changed = true;
        const std::string what = change;
        if (what == "grow") append_to_file(file, "6");
        if (what == "cut") cut_file(file, 3);
        if (what == "touch") {
          const struct timespec times[2] = {{1000, 0}, {1000, 0}};
          EXPECT_EQ(::utimensat(AT_FDCWD, file.c_str(), times, 0), 0);
        }
      }
      return FileFault{};
    });
    EXPECT_NE(problem_of([&] {
                read_input_file(file, "a");
              }).find("changed while it was read"),
              std::string::npos)
        << change;
  }
}

TEST(FileOps, TriesAgainWhenInterruptedAndGoesOnAfterShortWrites) {
  const TempFolder folder;
  int asked = 0;
  const HookGuard guard([&](FileOperation, const fs::path&) {
    FileFault fault;
    fault.error = ++asked % 2 == 1 ? EINTR : 0;
    fault.most_bytes = 2;
    return fault;
  });
  replace_file(folder / "a", "seven b");
  EXPECT_EQ(read_file(folder / "a"), "seven b");
  FileLock lock;
  EXPECT_TRUE(lock.try_lock(folder / "lock"));
  EXPECT_GT(asked, 10);
}

TEST(FileOps, FailsWhereToldTo) {
  const TempFolder folder;
  const HookGuard guard([&](FileOperation operation, const fs::path&) {
    return FileFault{operation == FileOperation::Flush ? EIO : 0, 100};
  });
  EXPECT_EQ(error_of([&] { append_to_file(folder / "a", "x"); }), EIO);
  EXPECT_EQ(error_of([&] { flush_folder(folder.path()); }), EIO);
}

TEST(FileLock, HoldsOffOthersUntilReleased) {
  const TempFolder folder;
  FileLock first;
  FileLock second;
  ASSERT_TRUE(first.try_lock(folder / "lock"));
  EXPECT_FALSE(second.try_lock(folder / "lock"));
  EXPECT_FALSE(second.held());
  FileLock moved = std::move(first);
  EXPECT_FALSE(second.try_lock(folder / "lock"));
  moved.release();
  EXPECT_TRUE(second.try_lock(folder / "lock"));
}

TEST(FileLock, EndsWithTheProcess) {
  const TempFolder folder;
  const pid_t child = ::fork();
  ASSERT_GE(child, 0);
  if (child == 0) {
    FileLock lock;
    if (!lock.try_lock(folder / "lock")) ::_exit(1);
    ::raise(SIGKILL);
  }
  int status = 0;
  ASSERT_EQ(::waitpid(child, &status, 0), child);
  EXPECT_TRUE(WIFSIGNALED(status));
  FileLock lock;
  EXPECT_TRUE(lock.try_lock(folder / "lock"));
}

TEST(UnsafePath, LetsPathsInsideBe) {
  const TempFolder folder;
  make_folders(folder / "data");
  write_new_file(folder / "data/a", "");
  fs::create_symlink("a", folder / "data/inside");
  fs::create_symlink("../data/a", folder / "data/round");
  for (const char* name : {"data/a", "data/missing", "./data/a", "missing/b",
                           "data/inside", "data/round", "..a", "a..b"}) {
    EXPECT_EQ(unsafe_path(folder.path(), name), "") << name;
  }
}

TEST(UnsafePath, NamesWhatLeavesTheFolder) {
  const TempFolder outer;
  const fs::path folder = outer / "sequence";
  make_folders(folder / "data");
  write_new_file(outer / "secret", "");
  fs::create_symlink("../../secret", folder / "data/out");
  fs::create_symlink(outer / "secret", folder / "absolute");
  fs::create_symlink("../nothing-yet", folder / "dangling");
  fs::create_symlink("..", folder / "up");
  fs::create_symlink("loop", folder / "loop");
  fs::create_symlink("up/secret", folder / "twice");
  EXPECT_EQ(unsafe_path(folder, ""), "empty");
  EXPECT_EQ(unsafe_path(folder, "/etc/passwd"), "absolute");
  EXPECT_EQ(unsafe_path(folder, "a\nb"), "holds a control character");
  EXPECT_EQ(unsafe_path(folder, std::string("a\0b", 3)),
            "holds a control character");
  for (const char* name : {"..", "../secret", "data/../../secret", "data/.."}) {
    EXPECT_EQ(unsafe_path(folder, name), "leaves the folder") << name;
  }
  for (const char* name :
       {"data/out", "absolute", "dangling", "up/secret", "loop", "twice"}) {
    EXPECT_EQ(unsafe_path(folder, name), "a symbolic link out of the folder")
        << name;
  }
}

TEST(UnsafePath, IsNotMisledByALinkToTheFolderItselfOrASimilarName) {
  const TempFolder outer;
  make_folders(outer / "run");
  make_folders(outer / "run-2");
  write_new_file(outer / "run-2/a", "");
  fs::create_directory_symlink(outer / "run", outer / "way");
  fs::create_symlink("../run-2/a", outer / "run/sibling");
  EXPECT_EQ(unsafe_path(outer / "way", "new"), "");
  EXPECT_EQ(unsafe_path(outer / "run", "sibling"),
            "a symbolic link out of the folder");
}

}  // namespace
}  // namespace loqsmith
