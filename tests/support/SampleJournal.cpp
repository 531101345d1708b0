// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/SampleRecord.h"
#include "ui/commands/PartCommand.h"
#include "ui/commands/ReadingCommands.h"
#include "ui/commands/Workbench.h"

#include <chrono>
#include <utility>

namespace spanwright::test {

namespace {

constexpr ReadingId slipped = 19;               ///< this one was typed with two digits exchanged
constexpr const char* asSlipped = "8.840";      ///< for 8.804 in the run falling from 10 bar
constexpr std::int64_t untilNoticed = 21'000;   ///< ms
constexpr std::int64_t betweenChanges = 95'000; ///< ms

std::int64_t at(std::chrono::year_month_day day, std::chrono::minutes time) {
    using namespace std::chrono;
    return duration_cast<milliseconds>((sys_days{day} + time).time_since_epoch()).count();
}

template <class Part>
void fill(Workbench& workbench, Part Record::*part, const Record& wanted) {
    workbench.perform(std::make_unique<PartCommand<Part>>(QString(), part, wanted.*part));
}

} // namespace

Record pressureTransmitterAsTaken() {
    using namespace std::chrono;
    const Record wanted = pressureTransmitter();
    std::int64_t now = at(October / 12 / 2026, 15h + 10min);
    Workbench workbench([&now] { return now; });
    const auto step = [&](auto part) {
        fill(workbench, part, wanted);
        now += betweenChanges;
    };
    workbench.setPerson("TL");
    step(&Record::job);
    step(&Record::item);
    step(&Record::standards);
    step(&Record::plan);
    step(&Record::limits);

    workbench.setPerson("IO");
    now = at(October / 13 / 2026, 8h + 20min);
    step(&Record::conditions);
    for (std::size_t row = 0; row < wanted.readings->size(); ++row) {
        Reading reading = wanted.readings->row(row);
        const std::optional<Decimal> indication = reading.indication;
        const ReadingId id = std::exchange(reading.id, 0);
        now = reading.enteredAt;
        if (id == slipped)
            reading.indication = number(asSlipped);
        workbench.perform(std::make_unique<AddReadings>(std::vector{reading}));
        now += untilNoticed;
        if (id == slipped)
            workbench.perform(std::make_unique<AmendValue>(id, NumberColumn::Indication, indication, "digits exchanged"));
    }
    now = at(October / 13 / 2026, 13h + 40min);
    Record signedByOne = wanted;
    signedByOne.signOffs.resize(1);
    fill(workbench, &Record::signOffs, signedByOne);

    workbench.setPerson("TL");
    now = at(October / 14 / 2026, 9h + 5min);
    step(&Record::budget);
    step(&Record::choices);
    step(&Record::signOffs);
    return workbench.record();
}

} // namespace spanwright::test
