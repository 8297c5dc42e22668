# cmake -C tests/build-modes/asan-ubsan.cmake: every test under the address and
# undefined-behaviour sanitizers. Dividing a double by zero is not among them:
# IEEE 754 defines it, and our guards test the outcome.
#
# Unoptimised, because compiling under sanitizers takes longer than testing; the
# rooms in which simulations spend their time are compiled with -O1
# (LOQSMITH_BUSY_ROOM_FLAGS).
set(CMAKE_BUILD_TYPE Debug CACHE STRING "")
set(CMAKE_CXX_FLAGS_DEBUG
    "-O0 -g1 -fno-omit-frame-pointer -fsanitize=address,undefined -fno-sanitize-recover=undefined"
    CACHE STRING "")
set(LOQSMITH_BUSY_ROOM_FLAGS "-O1" CACHE STRING "")
# Compiling is what takes the time: tests that compare numbers with published
# ones or simulate for long run in Release only, and the tests themselves are not
# instrumented.
set(LOQSMITH_LABELS_LEFT_OUT reference slow CACHE STRING "")
set(LOQSMITH_TEST_FLAGS "-fno-sanitize=all" CACHE STRING "")
set(LOQSMITH_PRECOMPILED_STANDARD ON CACHE BOOL "")
