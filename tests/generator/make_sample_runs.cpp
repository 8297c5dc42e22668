#include <exception>
#include <filesystem>
#include <iostream>

#include "generator/write_night.hpp"

// make_sample_runs FOLDER: writes both sample runs and their truth below it.
int main(int count, char** words) {
  if (count != 2) {
    std::cerr << "usage: make_sample_runs FOLDER   (e.g. sample-runs)\n";
    return 64;
  }
  try {
    loqsmith::test::write_well_water(words[1]);
    loqsmith::test::write_tablet_coating(words[1]);
  } catch (const std::exception& problem) {
    std::cerr << "make_sample_runs: " << problem.what() << '\n';
    return 74;
  }
  return 0;
}
