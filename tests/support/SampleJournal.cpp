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

/// A record being made change by change, as its people did it, at a clock of its own.
class Making {
  public:
    explicit Making(Record wanted) : wanted_(std::move(wanted)), workbench_([this] { return now_; }) {}

    void sitDown(const char* person, std::int64_t at) {
        workbench_.setPerson(person);
        now_ = at;
    }
    template <class Part>
    void fill(Part Record::*part, Part as) {
        workbench_.perform(std::make_unique<PartCommand<Part>>(QString(), part, std::move(as)));
        now_ += betweenChanges;
    }
    template <class Part>
    void fill(Part Record::*part) {
        fill(part, wanted_.*part);
    }
    void type(Reading reading) {
        reading.id = 0;
        now_ = reading.enteredAt;
        workbench_.perform(std::make_unique<AddReadings>(std::vector{std::move(reading)}));
    }
    void putRight(ReadingId id, const std::optional<Decimal>& indication, const char* reason) {
        now_ += untilNoticed;
        workbench_.perform(std::make_unique<AmendValue>(id, NumberColumn::Indication, indication, reason));
    }
    [[nodiscard]] const Record& wanted() const { return wanted_; }
    [[nodiscard]] const Record& record() const { return workbench_.record(); }

  private:
    Record wanted_;
    std::int64_t now_ = 0;
    Workbench workbench_;
};

} // namespace

Record pressureTransmitterAsTaken() {
    using namespace std::chrono_literals;
    Making making(pressureTransmitter());
    making.sitDown("TL", momentOf(12, 15h + 10min));
    making.fill(&Record::job);
    making.fill(&Record::item);
    making.fill(&Record::standards);
    making.fill(&Record::plan);
    making.fill(&Record::limits);

    making.sitDown("IO", momentOf(13, 8h + 20min));
    making.fill(&Record::conditions);
    const ReadingColumns& readings = *making.wanted().readings;
    for (std::size_t row = 0; row < readings.size(); ++row) {
        Reading reading = readings.row(row);
        if (reading.id != slipped) {
            making.type(reading);
            continue;
        }
        const std::optional<Decimal> indication = std::exchange(reading.indication, number(asSlipped));
        making.type(reading);
        making.putRight(slipped, indication, "digits exchanged");
    }
    making.sitDown("IO", momentOf(13, 13h + 40min));
    making.fill(&Record::signOffs, {making.wanted().signOffs.front()});

    making.sitDown("TL", momentOf(14, 9h + 5min));
    making.fill(&Record::budget);
    making.fill(&Record::choices);
    making.fill(&Record::signOffs);
    return making.record();
}

Record asTaken(const Record& wanted) {
    constexpr std::int64_t Minute = 60'000, Day = 24 * 60 * Minute;
    const std::int64_t first = wanted.readings->enteredAt().front();
    Making making(wanted);
    making.sitDown("TL", first - Day);
    making.fill(&Record::job);
    making.fill(&Record::item);
    making.fill(&Record::standards);
    making.fill(&Record::plan);
    making.fill(&Record::choices);
    making.sitDown("IO", first - 10 * Minute);
    making.fill(&Record::conditions);
    for (std::size_t row = 0; row < wanted.readings->size(); ++row)
        making.type(wanted.readings->row(row));
    return making.record();
}

} // namespace spanwright::test
