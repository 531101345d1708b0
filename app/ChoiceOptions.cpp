// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/ChoiceOptions.h"

#include "core/record/Fields.h"

#include <charconv>

namespace spanwright {

namespace {

constexpr OptionSpec known[] = {{"--function"}, {"--fit"},  {"--method"},  {"--weights"},  {"--covariance"},    {"--coverage"},
                                {"--phase"},    {"--at"},   {"--read"},    {"--repeats"},  {"--outliers"},      {"--outlier-level"},
                                {"--shared-error"}, {"--robust"}, {"--tolerance-share"}};

Error badValue(std::string_view option, std::string_view text) {
    return Error(ErrorCode::UsageValueBad, {{"option", std::string(option)}, {"text", std::string(text)}});
}

std::vector<std::string_view> divided(std::string_view text, std::string_view separators) {
    std::vector<std::string_view> parts;
    for (;;) {
        const std::size_t end = text.find_first_of(separators);
        parts.push_back(text.substr(0, end));
        if (end == std::string_view::npos)
            return parts;
        text.remove_prefix(end + 1);
    }
}

std::optional<int> wholeNumber(std::string_view text, int least, int most) {
    int number = 0;
    const auto [end, problem] = std::from_chars(text.data(), text.data() + text.size(), number);
    if (problem != std::errc{} || end != text.data() + text.size() || number < least || number > most)
        return std::nullopt;
    return number;
}

/// A probability between 0 and 1, with either decimal mark: neither can be mistaken there.
std::optional<Decimal> probability(std::string_view text) {
    for (const DecimalMark mark : {DecimalMark::Point, DecimalMark::Comma}) {
        const Result<Decimal> number = Decimal::parse(text, mark);
        if (number && number->toDouble() > 0 && number->toDouble() < 1)
            return *number;
    }
    return std::nullopt;
}

/// One option after the other onto the choices.
class Applier {
  public:
    Applier(Choices& choices, DecimalMark mark) : choices_(choices), mark_(mark) {}

    /// Whether the option took the value.
    bool apply(std::string_view option, std::string_view text) {
        if (option == "--function")
            return setFunction(text);
        if (option == "--fit")
            return set(choices_.fit, text);
        if (option == "--method")
            return set(choices_.method, text);
        if (option == "--weights")
            return set(choices_.weights, text);
        if (option == "--covariance")
            return set(choices_.covariance, text);
        if (option == "--shared-error")
            return set(choices_.sharedError, text);
        if (option == "--robust")
            return set(choices_.robust, text);
        if (option == "--tolerance-share")
            return setProbability(choices_.toleranceShare, text);
        if (option == "--phase")
            return set(choices_.phase, text);
        if (option == "--coverage")
            return setProbability(choices_.coverage, text);
        if (option == "--outlier-level")
            return setProbability(choices_.outlierLevel, text);
        if (option == "--at")
            return append(choices_.at, text);
        if (option == "--read")
            return append(choices_.read, text);
        if (option == "--repeats")
            return setRepeats(text);
        return setOutliers(text);
    }

  private:
    template <class E>
    static bool set(E& field, std::string_view text) {
        const std::optional<E> value = valueOf<E>(text);
        field = value.value_or(field);
        return value.has_value();
    }

    bool setFunction(std::string_view text) {
        const Result<FunctionChoice> function = parseFunctionName(text);
        if (function)
            choices_.function = *function;
        return function.ok();
    }

    static bool setProbability(Decimal& field, std::string_view text) {
        const std::optional<Decimal> value = probability(text);
        field = value.value_or(field);
        return value.has_value();
    }

    bool append(std::vector<Decimal>& list, std::string_view text) const {
        const Result<std::vector<Decimal>> more = numberList({}, text, mark_);
        if (more)
            list.insert(list.end(), more->begin(), more->end());
        return more.ok();
    }

    bool setRepeats(std::string_view text) {
        const std::optional<int> number = wholeNumber(text, 1, 1'000'000'000);
        if (!number && text != "inf")
            return false;
        choices_.repeats = number;
        return true;
    }

    bool setOutliers(std::string_view text) {
        const std::optional<int> number = wholeNumber(text, 1, 1'000'000);
        choices_.outliers = number.value_or(choices_.outliers);
        return number.has_value();
    }

    Choices& choices_;
    DecimalMark mark_;
};

} // namespace

std::span<const OptionSpec> choiceOptions() {
    return known;
}

Result<Choices> withOptions(Choices choices, const Arguments& arguments, DecimalMark mark) {
    if (arguments.has("--at"))
        choices.at.clear();
    if (arguments.has("--read"))
        choices.read.clear();
    Applier applier(choices, mark);
    for (const auto& [option, text] : arguments.options)
        for (const OptionSpec& spec : known)
            if (spec.name == option && !applier.apply(option, text))
                return badValue(option, text);
    return choices;
}

Result<std::vector<Decimal>> numberList(std::string_view option, std::string_view text, DecimalMark mark) {
    std::vector<Decimal> numbers;
    for (const std::string_view part : divided(text, mark == DecimalMark::Comma ? ";" : ",;")) {
        const Result<Decimal> number = Decimal::parse(part, mark);
        if (!number)
            return badValue(option, text);
        numbers.push_back(*number);
    }
    return numbers;
}

Result<std::vector<std::size_t>> rowList(std::string_view option, std::string_view text) {
    std::vector<std::size_t> rows;
    for (const std::string_view part : divided(text, ",;")) {
        const std::optional<int> row = wholeNumber(part, 1, 2'000'000'000);
        if (!row)
            return badValue(option, text);
        rows.push_back(static_cast<std::size_t>(*row));
    }
    return rows;
}

} // namespace spanwright
