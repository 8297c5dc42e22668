#include "loqsmith/night/folder_history.hpp"

#include "loqsmith/base/files.hpp"
#include "loqsmith/ledger/chain.hpp"
#include "loqsmith/ledger/out_layout.hpp"

namespace loqsmith {
namespace {

std::string sequence_of(const std::string& object) {
  return object.substr(0, object.rfind('/'));
}

}  // namespace

FolderHistory history_of_folder(const std::vector<LedgerLine>& lines,
                                const std::filesystem::path& folder) {
  FolderHistory history;
  std::string run;  // the last one begun of this folder
  for (const LedgerLine& line : lines) {
    if (line.action == "run-begun" &&
        detail_of(line, "folder") == as_ledger_text(folder.string())) {
      run = line.object;
      history.last = FolderHistory::Last::AtWork;
      history.sequence = sequence_of(run);
      history.state = detail_of(line, "state");
      history.contents.clear();
    } else if (line.action == "sequence-refused" &&
               detail_of(line, "folder") == as_ledger_text(folder.string())) {
      history.last = FolderHistory::Last::Refused;
      history.state = detail_of(line, "state");
      history.contents = detail_of(line, "contents");
      run.clear();
    } else if (!run.empty() && line.object == run) {
      if (line.action == "run-published") {
        history.last = FolderHistory::Last::Published;
        history.contents = detail_of(line, "contents");
      } else if (line.action == "run-abandoned") {
        history.last = FolderHistory::Last::Abandoned;
      }
    }
  }
  return history;
}

std::vector<LedgerLine> ledger_lines(const std::filesystem::path& out) {
  const OutLayout layout{out};
  if (!is_there(layout.ledger())) return {};
  return read_chain(read_file(layout.ledger())).lines;
}

}  // namespace loqsmith
