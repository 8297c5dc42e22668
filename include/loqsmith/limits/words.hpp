#pragma once

#include "loqsmith/base/reading_figures.hpp"
