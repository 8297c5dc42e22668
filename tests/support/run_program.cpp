#include "support/run_program.hpp"

#include <fcntl.h>
#include <sys/wait.h>
#include <unistd.h>

#include <array>
#include <cstdio>
#include <cstdlib>
#include <stdexcept>

namespace loqsmith::test {
namespace {

// An anonymous file: a pipe could fill up while the other one is read.
class Capture {
 public:
  Capture() : file_(std::tmpfile()) {
    if (file_ == nullptr) throw std::runtime_error("no temporary file");
  }
  ~Capture() { std::fclose(file_); }
  Capture(const Capture&) = delete;
  Capture& operator=(const Capture&) = delete;

  int descriptor() const { return fileno(file_); }

  std::string text() const {
    std::string all;
    std::array<char, 4096> buffer{};
    std::rewind(file_);
    while (const std::size_t got =
               std::fread(buffer.data(), 1, buffer.size(), file_)) {
      all.append(buffer.data(), got);
    }
    return all;
  }

 private:
  std::FILE* file_;
};

[[noreturn]] void become(const std::string& program,
                         const std::vector<std::string>& arguments,
                         const std::vector<std::string>& environment,
                         const std::string& folder, int out, int err) {
  dup2(open("/dev/null", O_RDONLY | O_CLOEXEC), STDIN_FILENO);
  dup2(out, STDOUT_FILENO);
  dup2(err, STDERR_FILENO);
  if (!folder.empty() && chdir(folder.c_str()) != 0) _exit(127);
  for (const std::string& entry : environment) {
    putenv(const_cast<char*>(entry.c_str()));
  }
  std::vector<char*> words{const_cast<char*>(program.c_str())};
  for (const std::string& argument : arguments) {
    words.push_back(const_cast<char*>(argument.c_str()));
  }
  words.push_back(nullptr);
  execv(program.c_str(), words.data());
  _exit(127);
}

}  // namespace

ProgramRun run_program(const std::string& program,
                       const std::vector<std::string>& arguments,
                       const std::vector<std::string>& environment,
                       const std::string& folder) {
  const Capture out;
  const Capture err;
  const pid_t child = fork();
  if (child == 0) {
    become(program, arguments, environment, folder, out.descriptor(),
           err.descriptor());
  }
  int state = 0;
  if (child < 0 || waitpid(child, &state, 0) != child) {
    throw std::runtime_error("cannot run " + program);
  }
  return {WIFEXITED(state) ? WEXITSTATUS(state) : -WTERMSIG(state), out.text(),
          err.text()};
}

}  // namespace loqsmith::test
