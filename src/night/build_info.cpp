#include "loqsmith/night/build_info.hpp"

namespace loqsmith {

std::string program_version() { return LOQSMITH_VERSION; }

std::string build_description() {
  return std::string("g++ ") + __VERSION__ + ", " + LOQSMITH_BUILD_TYPE;
}

std::string processor_class() {
#if defined(__x86_64__)
  if (__builtin_cpu_supports("x86-64-v4")) return "x86-64-v4";
  if (__builtin_cpu_supports("x86-64-v3")) return "x86-64-v3";
  if (__builtin_cpu_supports("x86-64-v2")) return "x86-64-v2";
  return "x86-64";
#else
  return "other";
#endif
}

}  // namespace loqsmith
