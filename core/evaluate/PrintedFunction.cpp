// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/evaluate/PrintedFunction.h"

#include "core/base/Rounding.h"
#include "core/evaluate/PrintedGrid.h"

#include <algorithm>
#include <charconv>
#include <cmath>
#include <cstdlib>

namespace spanwright {

namespace {

constexpr int MostDigits = 17;       // a double survives the way through 17 digits
constexpr int MostRawDigits = 15;    // beyond, powers of x cancel each other
constexpr int FullDigits = 17;

/// `digits` significant digits, without zeros at the end of the decimals.
std::string digitsText(double value, int digits) {
    std::string text = significantDigits(value, digits);
    if (digits > MostRawDigits) {
        char buffer[48];
        const auto end = std::to_chars(buffer, buffer + sizeof buffer, value, std::chars_format::general, digits);
        text.assign(buffer, end.ptr);
    }
    const std::size_t e = text.find('e');
    std::string exponent = e == std::string::npos ? std::string() : text.substr(e);
    text.resize(std::min(e, text.size()));
    if (text.find('.') != std::string::npos)
        text.resize(text.find_last_not_of('0') + 1);
    if (text.ends_with('.'))
        text.pop_back();
    return text + exponent;
}

std::string shortest(double value) {
    // In a sentence an exponent stands only where the plain number would be long.
    const double size = std::fabs(value);
    char buffer[40];
    if (size >= 1e-6 && size < 1e15)
        return {buffer, std::to_chars(buffer, buffer + sizeof buffer, value, std::chars_format::fixed).ptr};
    return {buffer, std::to_chars(buffer, buffer + sizeof buffer, value).ptr};
}

double numberOf(const std::string& text) {
    return std::strtod(text.c_str(), nullptr);
}

/// The numbers of a function in full precision, before they are rounded.
struct FullNumbers {
    std::vector<PrintedNumber> names; ///< without text
    std::vector<double> values;
    std::optional<double> centre;
};

FullNumbers reported(const Fit& fit) {
    FullNumbers full;
    for (const Coefficient& coefficient : fit.coefficients) {
        full.names.push_back({coefficient.name, coefficient.unit, {}, coefficient.standardUncertainty});
        full.values.push_back(coefficient.value);
    }
    if (fit.function.family == FunctionFamily::Nernst) { // in the unit of the indication, as a logger needs it
        const double slope = -fit.curve->derivative(7);
        full.names[1].unit = full.names[0].unit;
        full.names[1].standardUncertainty = fit.coefficients[1].standardUncertainty * std::fabs(slope / full.values[1]);
        full.values[1] = slope;
    }
    return full;
}

/// A polynomial in powers of x − centre: through as many points as it has coefficients, at Chebyshev's places, by divided differences.
FullNumbers centred(const Fit& fit) {
    const bool alone = fit.function.family == FunctionFamily::PolynomialNoConstant || fit.function.family == FunctionFamily::Proportional;
    const std::size_t n = fit.terms() + (alone ? 1 : 0);
    const double half = (fit.high - fit.low) / 2, middle = fit.low + half;
    FullNumbers full;
    full.centre = numberOf(roundedText(middle, decimalsFor(half, 2)));
    std::vector<double> at(n), newton(n);
    for (std::size_t i = 0; i < n; ++i) {
        at[i] = std::cos((static_cast<double>(i) + 0.5) / static_cast<double>(n) * 3.14159265358979324);
        newton[i] = fit.curve->value(middle + half * at[i]);
        at[i] = (middle + half * at[i] - *full.centre) / half;
    }
    for (std::size_t order = 1; order < n; ++order)
        for (std::size_t i = n - 1; i >= order; --i)
            newton[i] = (newton[i] - newton[i - 1]) / (at[i] - at[i - order]);
    std::vector<double> power(n, 0.0);
    for (std::size_t k = n; k-- > 0;) {
        for (std::size_t j = n - 1; j > 0; --j)
            power[j] = power[j - 1] - at[k] * power[j];
        power[0] = newton[k] - at[k] * power[0];
    }
    for (std::size_t k = 0; k < n; ++k) {
        full.names.push_back({"c" + std::to_string(k), {}, {}, {}});
        full.values.push_back(power[k] / std::pow(half, static_cast<double>(k)));
    }
    return full;
}

/// Searches the digits for one set of numbers.
class DigitSearch {
  public:
    DigitSearch(const Fit& fit, const PrintedGrid& grid, FullNumbers full, const LoggerConstants& constants)
        : fit_(fit), grid_(grid), full_(std::move(full)), constants_(constants) {
        constants_.centre = full_.centre;
    }

    /// The least digits, the same for all, that hold; then each number alone is brought down as far as it goes.
    std::optional<std::vector<int>> fewest(int most) {
        std::vector<int> digits;
        for (int all = 1; all <= most; ++all) {
            digits.assign(full_.values.size(), all);
            if (holds(digits))
                break;
            if (all == most)
                return std::nullopt;
        }
        for (std::size_t i = digits.size(); i-- > 0;)
            while (digits[i] > 1 && holdsWithOneLess(digits, i))
                --digits[i];
        return digits;
    }

    [[nodiscard]] LoggerFunction made(const std::vector<int>& digits) const {
        std::vector<double> numbers;
        for (std::size_t i = 0; i < digits.size(); ++i)
            numbers.push_back(numberOf(digitsText(full_.values[i], digits[i])));
        return {fit_.function, constants_, std::move(numbers)};
    }

    [[nodiscard]] std::vector<PrintedNumber> printed(const std::vector<int>& digits) const {
        std::vector<PrintedNumber> numbers = full_.names;
        for (std::size_t i = 0; i < digits.size(); ++i)
            numbers[i].text = digitsText(full_.values[i], digits[i]);
        return numbers;
    }

  private:
    [[nodiscard]] bool holds(const std::vector<int>& digits) const { return grid_.holds(made(digits)); }
    [[nodiscard]] bool holdsWithOneLess(std::vector<int> digits, std::size_t i) const {
        --digits[i];
        return holds(digits);
    }

    const Fit& fit_;
    const PrintedGrid& grid_;
    FullNumbers full_;
    LoggerConstants constants_;
};

/// Knots with as many decimals as are needed, the same for all abscissae and the same for all ordinates.
class TableSearch {
  public:
    TableSearch(const Fit& fit, const PrintedGrid& grid, const LoggerConstants& constants)
        : fit_(fit), grid_(grid), constants_(constants), knots_(fit.curve->knots()) {}

    struct Decimals {
        int x = 0, y = 0;
    };

    [[nodiscard]] std::optional<Decimals> fewest() const {
        Decimals decimals{decimalsFor(fit_.high - fit_.low, 1), decimalsFor(largestOrdinate(), 1)};
        for (int step = 0; step <= MostRawDigits; ++step, ++decimals.x, ++decimals.y) {
            if (!holds(decimals))
                continue;
            for (; holds({decimals.x - 1, decimals.y}); --decimals.x) {
            }
            for (; holds({decimals.x, decimals.y - 1}); --decimals.y) {
            }
            return decimals;
        }
        return std::nullopt;
    }

    [[nodiscard]] std::vector<PrintedNumber> printed(const std::optional<Decimals>& decimals) const {
        std::vector<PrintedNumber> numbers;
        for (std::size_t i = 0; i < knots_.size(); ++i) {
            const std::string x = decimals ? roundedText(knots_[i], decimals->x) : digitsText(knots_[i], FullDigits);
            const double y = fit_.curve->value(numberOf(x));
            const std::string number = std::to_string(i + 1);
            numbers.push_back({"x" + number, {}, x, {}});
            const Coefficient& coefficient = fit_.coefficients[i];
            numbers.push_back({"y" + number, coefficient.unit, decimals ? roundedText(y, decimals->y) : digitsText(y, FullDigits), coefficient.standardUncertainty});
        }
        return numbers;
    }

    [[nodiscard]] LoggerFunction made(const std::optional<Decimals>& decimals) const {
        std::vector<double> numbers;
        for (const PrintedNumber& number : printed(decimals))
            numbers.push_back(numberOf(number.text));
        return {fit_.function, constants_, std::move(numbers)};
    }

  private:
    [[nodiscard]] double largestOrdinate() const {
        double largest = 0;
        for (const Coefficient& coefficient : fit_.coefficients)
            largest = std::max(largest, std::fabs(coefficient.value));
        return largest;
    }
    /// Knots must stay apart, where a straight function would not need them.
    [[nodiscard]] bool holds(const Decimals& decimals) const {
        const LoggerFunction logger = made(decimals);
        for (std::size_t i = 2; i < logger.numbers().size(); i += 2)
            if (!(logger.numbers()[i] > logger.numbers()[i - 2]))
                return false;
        return grid_.holds(logger);
    }

    const Fit& fit_;
    const PrintedGrid& grid_;
    LoggerConstants constants_;
    std::vector<double> knots_;
};

PrintedFunction tablePrinted(const Fit& fit, const PrintedGrid& grid, const LoggerConstants& constants) {
    const TableSearch search(fit, grid, constants);
    const auto decimals = grid.bounded() ? search.fewest() : std::nullopt;
    PrintedFunction printed(search.made(decimals));
    printed.numbers = search.printed(decimals);
    return printed;
}

PrintedFunction numbersPrinted(const Fit& fit, const PrintedGrid& grid, const LoggerConstants& constants) {
    const bool polynomial = isPolynomial(fit.function.family) && fit.high > fit.low;
    DigitSearch raw(fit, grid, reported(fit), constants);
    auto digits = grid.bounded() ? raw.fewest(polynomial ? MostRawDigits : MostDigits) : std::nullopt;
    if (!digits && polynomial) {
        FullNumbers full = centred(fit);
        const std::string centre = shortest(*full.centre);
        DigitSearch about(fit, grid, std::move(full), constants);
        digits = grid.bounded() ? about.fewest(MostDigits) : std::nullopt;
        if (digits) {
            PrintedFunction printed(about.made(*digits));
            printed.numbers = about.printed(*digits);
            printed.centre = centre;
            return printed;
        }
    }
    const std::vector<int> all = digits.value_or(std::vector<int>(fit.terms(), FullDigits));
    PrintedFunction printed(raw.made(all));
    printed.numbers = raw.printed(all);
    return printed;
}

/// As few digits as lie in the range, from `decimals` on; all of them where no fewer do.
std::string placeText(double x, double low, double high, int decimals) {
    for (int more = 0; more < 12; ++more) {
        const std::string text = roundedText(x, decimals + more);
        if (numberOf(text) >= low && numberOf(text) <= high)
            return text;
    }
    return shortest(x);
}

/// Three places in the range, in few digits.
std::vector<std::string> placesIn(double low, double high) {
    std::vector<std::string> places;
    for (const double share : {0.0, 0.5, 1.0}) {
        const std::string text = placeText(low + share * (high - low), low, high, decimalsFor(high - low, 4));
        if (places.empty() || places.back() != text)
            places.push_back(text);
    }
    return places;
}

void addChecks(PrintedFunction& printed, const Fit& fit, const PrintedGrid& grid) {
    const int decimals = grid.bounded() ? decimalsFor(grid.smallestExpanded(), 2) + 1 : 9;
    for (const std::string& x : placesIn(fit.low, fit.high))
        printed.checks.push_back({x, roundedText(printed.logger.value(numberOf(x)), decimals)});
    if (printed.inverse == InverseForm::None)
        return;
    const double one = printed.logger.value(fit.low), other = printed.logger.value(fit.high);
    const int back = grid.bounded() ? decimalsFor(grid.smallestExpandedAbscissa(), 2) + 1 : 9;
    for (const std::string& y : placesIn(std::min(one, other), std::max(one, other))) {
        const double x = printed.inverse == InverseForm::Closed ? printed.logger.inverse(numberOf(y))
                                                                : printed.logger.halvedInverse(numberOf(y), fit.low, fit.high);
        printed.inverseChecks.push_back({y, roundedText(x, back)});
    }
}

bool turns(const Fit& fit) {
    return std::any_of(fit.warnings.begin(), fit.warnings.end(), [](const Warning& warning) { return warning.code == WarningCode::NotMonotonic; });
}

} // namespace

std::optional<PrintedFunction> printedFunction(const Record& record, const PhaseEvaluation& phase, WithoutU without) {
    if (!phase.fit || phase.fit->curve == nullptr)
        return std::nullopt;
    const Fit& fit = *phase.fit;
    LoggerConstants constants;
    constants.zeroCelsius = record.item.reference.unit == "K" ? 273.15 : 0.0;
    constants.slopeSign = fit.curve->value(fit.high) < fit.curve->value(fit.low) ? -1 : 1;
    const bool invertible = fit.function.family != FunctionFamily::Constant && fit.high > fit.low && !turns(fit);
    PrintedGrid grid(record, phase, invertible ? InverseHeld::Yes : InverseHeld::No);
    const bool known = grid.bounded();
    if (!known && without == WithoutU::ByScatter)
        grid.boundByScatter();
    PrintedFunction printed =
        fit.function.family == FunctionFamily::Table ? tablePrinted(fit, grid, constants) : numbersPrinted(fit, grid, constants);
    printed.phase = phase.phase;
    printed.direction = fit.direction;
    printed.low = shortest(fit.low);
    printed.high = shortest(fit.high);
    printed.inverse = !invertible                         ? InverseForm::None
                      : printed.logger.hasClosedInverse() ? InverseForm::Closed
                                                          : InverseForm::Halving;
    if (known)
        printed.share = grid.largestShare(printed.logger);
    addChecks(printed, fit, grid);
    return printed;
}

} // namespace spanwright
