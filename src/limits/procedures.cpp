#include "loqsmith/limits/procedures.hpp"

#include "loqsmith/limits/accuracy_profile.hpp"
#include "loqsmith/limits/blank_and_low_level.hpp"
#include "loqsmith/limits/blank_deviation.hpp"
#include "loqsmith/limits/calibration_residual.hpp"
#include "loqsmith/limits/critical_and_detectable.hpp"
#include "loqsmith/limits/din_32645.hpp"
#include "loqsmith/limits/error_propagation.hpp"
#include "loqsmith/limits/established.hpp"
#include "loqsmith/limits/intercept_deviation.hpp"
#include "loqsmith/limits/low_level_precision.hpp"
#include "loqsmith/limits/noise_model_limit.hpp"
#include "loqsmith/limits/prediction_band.hpp"
#include "loqsmith/limits/signal_to_noise_limit.hpp"
#include "loqsmith/limits/spike_replicates.hpp"
#include "loqsmith/limits/two_component_limit.hpp"

namespace loqsmith {

const std::vector<LimitProcedure>& limit_procedures() {
  static const std::vector<LimitProcedure> kProcedures = {
      {"blank-deviation", "IUPAC 1978; ICH Q2(R2) (2023) 3.2.3", false,
       blank_deviation},
      {"calibration-residual", "ICH Q2(R2) (2023) 3.2.3", false,
       calibration_residual},
      {"intercept-deviation", "ICH Q2(R2) (2023) 3.2.3", false,
       intercept_deviation},
      {"signal-to-noise", "Ph. Eur. 2.2.46; ICH Q2(R2) (2023) 3.2.2", false,
       signal_to_noise_limit},
      {"noise-model", "ISO 11843-7 (2018)", true, noise_model_limit},
      {"spike-replicates", "US EPA 40 CFR 136 Appendix B, Revision 2 (2016)",
       false, spike_replicates},
      {"critical-and-detectable", "Currie 1995 (IUPAC); ISO 11843-2 (2000)",
       false, critical_and_detectable},
      {"din-32645", "DIN 32645 (2008)", false, din_32645},
      {"prediction-band", "Hubaux and Vos 1970", false, prediction_band},
      {"low-level-precision", "Eurachem, Fitness for Purpose (2014) 6.2", false,
       low_level_precision},
      {"blank-and-low-level", "CLSI EP17-A2 (2012)", false,
       blank_and_low_level},
      {"error-propagation", "Long and Winefordner 1983", false,
       error_propagation},
      {"two-component", "Rocke and Lorenzato 1995", true, two_component_limit},
      {"accuracy-profile", "Hubert et al. 2004", false, accuracy_profile},
      {"established", "the method", false, established}};
  return kProcedures;
}

const LimitProcedure* find_limit_procedure(std::string_view name) {
  for (const LimitProcedure& procedure : limit_procedures())
    if (procedure.name == name) return &procedure;
  return nullptr;
}

}  // namespace loqsmith
