#pragma once

#include <string>

namespace loqsmith {

/// "0.1.0".
std::string program_version();

/// Compiler and libraries that this program was built with.
std::string build_description();

/// The processor's level in the x86-64 ABI, on which the C library chooses its
/// exp, pow and erfc: "x86-64-v3"; on other machines "other".
std::string processor_class();

}  // namespace loqsmith
