// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/FilledRecord.h"

#include "core/record/Fields.h"

namespace spanwright::test {

namespace {

class Filler {
  public:
    template <class T>
    void operator()(std::string_view, T& field) {
        fill(field);
    }

  private:
    void fill(std::string& text) { text = "text " + std::to_string(++count_) + " \"<b>\\\n\t\xC2\xB0\xE2\x88\x92\xF0\x9F\x98\x80\x01"; }
    void fill(bool& flag) { flag = !flag; }
    void fill(int& number) { number = ++count_; }
    void fill(ReadingId& id) { id = ++count_; }
    void fill(Decimal& number) { number = Decimal{100'10 + ++count_ * 10, count_ % 7, {}}; }
    void fill(FunctionChoice& choice) { choice = {FunctionFamily::Polynomial, 3}; }
    template <class E>
        requires std::is_enum_v<E>
    void fill(E& value) {
        value = static_cast<E>((static_cast<std::size_t>(value) + 1) % EnumNames<E>::names.size());
    }
    template <class T>
    void fill(std::optional<T>& something) {
        fill(something.emplace());
    }
    template <class T>
    void fill(std::vector<T>& several) {
        several.resize(2);
        for (T& one : several)
            fill(one);
    }
    template <class P>
        requires requires(P& part, Filler& filler) { fields(part, filler); }
    void fill(P& part) {
        fields(part, *this);
    }

    int count_ = 0;
};

} // namespace

Record filledRecord() {
    Record record;
    Filler fill;
    parts(record, fill);
    ReadingColumns& readings = record.readings.edit();
    for (ReadingId id = 1; id <= 9; id += 2) {
        Reading reading;
        reading.id = id;
        reading.phase = id > 5 ? Phase::AsLeft : Phase::AsFound;
        reading.run = static_cast<int>(id);
        reading.direction = id % 4 == 1 ? Direction::Rising : Direction::Falling;
        reading.setPoint = Decimal{id * 10, 1, {}};
        reading.reference = Decimal{100'100 + id, 3, {}};
        if (id != 3)
            reading.indication = Decimal{-id, 4, {}};
        reading.uReference = *Decimal::parse("12345678901234567890.10");
        reading.uIndication = *Decimal::parse("1.50e-200");
        reading.uCovariance = *Decimal::parse("-0.000250");
        reading.enteredAt = 1'772'352'930'250 + id;
        reading.enteredBy = id == 5 ? "" : "T\"L";
        readings.append(reading);
    }
    record.nextReadingId = 12;
    record.exclusions.edit().add({3, ExclusionReason::Other, "bumped\nthe bench", "IO", 1'772'352'999'000});
    record.exclusions.edit().add({7, ExclusionReason::TypingSlip, "", "TL", 0});
    for (int i = 1; i <= 4; ++i)
        record.journal.edit().append({1'772'352'930'000 + i, "IO", "value-amended", "reading " + std::to_string(i) + " indication",
                                      "1.847", "1.487", i == 2 ? "digits \"swapped\"" : ""});
    return record;
}

} // namespace spanwright::test
