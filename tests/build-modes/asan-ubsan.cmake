# cmake -C tests/build-modes/asan-ubsan.cmake: every test under the address and
# undefined-behaviour sanitizers. Dividing a double by zero is not among them:
# IEEE 754 defines it, and our guards test the outcome.
set(CMAKE_BUILD_TYPE Debug CACHE STRING "")
set(CMAKE_CXX_FLAGS_DEBUG
    "-O1 -g1 -fno-omit-frame-pointer -fsanitize=address,undefined -fno-sanitize-recover=undefined"
    CACHE STRING "")
