#pragma once

#include <vector>

#include "calibration/examples.hpp"

namespace loqsmith::test {

/// Toluene by gas chromatography with mass spectrometry, pg, four replicates
/// of each of six amounts: Rocke and Lorenzato, Technometrics 37 (1995) 176;
/// from memory.
inline std::vector<StandardPoint> toluene() {
  return standards({{4.6, 29.80},      {4.6, 16.85},      {4.6, 16.68},
                    {4.6, 19.52},      {23, 44.60},       {23, 48.13},
                    {23, 42.27},       {23, 34.78},       {116, 207.70},
                    {116, 222.40},     {116, 172.88},     {116, 207.51},
                    {580, 894.67},     {580, 821.30},     {580, 773.40},
                    {580, 936.93},     {3000, 5350.65},   {3000, 4942.63},
                    {3000, 4315.79},   {3000, 3879.28},   {15000, 20718.14},
                    {15000, 24781.61}, {15000, 22405.76}, {15000, 24863.91}});
}

}  // namespace loqsmith::test
