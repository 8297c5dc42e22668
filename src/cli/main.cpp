#include <exception>
#include <iostream>
#include <string>
#include <vector>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/cli/options.hpp"
#include "loqsmith/cli/verb.hpp"
#include "loqsmith/night/build_info.hpp"

namespace loqsmith {

const std::vector<Verb>& verbs() {
  static const std::vector<Verb> kVerbs{
      {"process", "FOLDER... --out OUT",
       "judge a night's sequence and publish the results", process_verb},
      {"nightly", "ROOT --out OUT",
       "process every settled folder that is new or changed", nightly_verb},
      {"inspect", "FILE...", "show what a chromatogram file holds",
       inspect_verb},
      {"explain", "OUT/SEQUENCE/run-N",
       "derive one published result, step by step", explain_verb},
      {"verify", "OUT", "check everything published against the ledger",
       verify_verb},
      {"signers", "add|remove|list",
       "keep the register of those who may sign", signers_verb},
      {"sign", "OUT/SEQUENCE/run-N", "sign a published run with your own key",
       sign_verb},
  };
  return kVerbs;
}

namespace {

std::string general_help() {
  std::string help =
      "Examples:\n"
      "  loqsmith process well-water-0412 --out results\n"
      "  loqsmith nightly sequences --out results\n"
      "  loqsmith inspect well-water-0412/data/inj07.mzML\n"
      "  loqsmith explain results/well-water-0412/run-0001 --sample W-108 "
      "--analyte simazine\n"
      "  loqsmith verify results\n"
      "  loqsmith sign results/well-water-0412/run-0001 --key ada.key "
      "--meaning approved\n\n"
      "Usage:\n  loqsmith VERB ARGUMENTS\n\nVerbs:\n";
  for (const Verb& verb : verbs()) {
    std::string left =
        "  " + std::string(verb.name) + ' ' + std::string(verb.arguments);
    left.resize(std::max<std::size_t>(left.size() + 1, 32), ' ');
    help += left + std::string(verb.summary) + '\n';
  }
  help +=
      "\n  loqsmith VERB --help      all options of a verb\n"
      "  loqsmith --version        the program's version\n\n"
      "Exit status: 0 done; 1 done, and something was withheld or needs a\n"
      "person; 64 wrong use of the command line; 65 the sequence could not be\n"
      "processed; 70 a fault of the program; 73 OUT cannot be created; 74 "
      "input\n"
      "or output failed, or the ledger is damaged; 75 another process holds "
      "OUT\n"
      "or the sequence.\n\n"
      "The results support, and do not replace, the laboratory's validated\n"
      "procedures, local regulations and qualified review.\n";
  return help;
}

ExitStatus wrong_use(const std::string& message) {
  std::cerr << "loqsmith: " << message << "\nTry: loqsmith --help\n";
  return ExitStatus::WrongUse;
}

ExitStatus dispatch(const std::vector<std::string>& words) {
  if (words.empty()) return wrong_use("a verb is missing");
  if (words[0] == "--help" || words[0] == "help") {
    std::cout << general_help();
    return ExitStatus::Done;
  }
  if (words[0] == "--version") {
    std::cout << "loqsmith " << program_version() << '\n'
              << "MIT licence; no warranty.\n";
    return ExitStatus::Done;
  }
  std::vector<std::string> names;
  for (const Verb& verb : verbs()) {
    if (verb.name == words[0]) {
      return verb.run({words.begin() + 1, words.end()});
    }
    names.emplace_back(verb.name);
  }
  const std::string near = nearest_name(words[0], names);
  return wrong_use("unknown verb " + in_quotes(words[0]) +
                   (near.empty() ? "" : "; did you mean " + near + "?"));
}

ExitStatus run(const std::vector<std::string>& words) {
  try {
    return dispatch(words);
  } catch (const WrongUse& error) {
    return wrong_use(error.what());
  } catch (const Halt& halt) {
    std::cerr << "loqsmith: " << halt.what() << '\n';
    return halt.status();
  } catch (const InputError& error) {
    std::cerr << error.what() << '\n';
    return ExitStatus::BadInput;
  } catch (const std::exception& error) {
    std::cerr << "loqsmith: a fault of the program: " << error.what() << '\n';
    return ExitStatus::ProgramFault;
  }
}

}  // namespace
}  // namespace loqsmith

int main(int argc, char** argv) {
  const std::vector<std::string> words(argv + 1, argv + argc);
  const auto status = loqsmith::run(words);
  std::cout.flush();
  if (!std::cout) {
    std::cerr << "loqsmith: cannot write to standard output\n";
    return static_cast<int>(loqsmith::ExitStatus::IoFailed);
  }
  return static_cast<int>(status);
}
