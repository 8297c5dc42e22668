// Writes the schema of method.xml to standard output.
#include <iostream>

#include "loqsmith/sheets/method_schema.hpp"

int main() {
  loqsmith::write_method_schema(std::cout);
  return std::cout.flush() ? 0 : 1;
}
