// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "tests/support/SampleLaboratory.h"

namespace spanwright::test {

/// The record of sample-data/pressure-transmitter.spanwright: an invented 0 to 10 bar, 4 to 20 mA transmitter with hysteresis and a
/// slight curvature, 66 readings as found (eleven set points, rising and falling, three runs) and 10 as left, complete but for
/// the authorisation. Its journal is empty.
Record pressureTransmitter();

/// The same record as its people made it, change by change through the commands of the window, so with its journal: the job first,
/// then every reading as it was typed, one with two digits exchanged and put right, then the signatures.
Record pressureTransmitterAsTaken();

/// The records of the sample sessions of that name. Their readings are those of the tables beside them; their journals are empty.
Record temperatureProbe();
Record loadCell();
Record flowSensorAsTyped();
/// A record as its people made it through the commands of the window: the job first, then every reading as it was typed.
Record asTaken(const Record& wanted);

} // namespace spanwright::test
