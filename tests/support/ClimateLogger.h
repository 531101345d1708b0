// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>

namespace spanwright::test {

/// The text of sample-data/climate-logger.csv: three probes beside a reference in a climatic chamber, nine plateaus of 90 min at
/// one row each 30 s, semicolons, decimal commas, a row of units, day.month.year, and what real loggers do: blanks, "OVR", a gap of
/// seven minutes, a row written twice, the clock set back by an hour in autumn, and one probe left in °F under a head of °C.
/// Integer random numbers and plain arithmetic only, so every machine makes the same bytes.
std::string climateLogger();

} // namespace spanwright::test
