// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/evaluate/FunctionCode.h"

#include <algorithm>
#include <array>
#include <string_view>

namespace spanwright {

namespace {

using F = FunctionFamily;

constexpr auto reserved = std::to_array<std::string_view>({
    "auto", "break", "case", "char", "const", "continue", "default", "do", "double", "else", "enum", "extern", "float", "for", "goto",
    "if", "inline", "int", "long", "register", "restrict", "return", "short", "signed", "sizeof", "static", "struct", "switch",
    "typedef", "union", "unsigned", "void", "volatile", "while", "exp", "log", "log10", "pow", "sqrt", "x", "y",
    "i", "u", "t", "root", "below", "low", "high", "middle"});
constexpr std::size_t KnotsInALine = 6;

bool isLetter(char c) {
    return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z');
}
bool isDigit(char c) {
    return c >= '0' && c <= '9';
}

/// Letters, digits and underscores of a name, in lower case; empty where no name in C can be made of it.
std::string identifier(const std::string& name) {
    std::string made;
    for (const char c : name) {
        if (isLetter(c))
            made += static_cast<char>(c | 0x20);
        else if (isDigit(c) && !made.empty())
            made += c;
        else if (c == ' ' || c == '-' || c == '_')
            made += made.empty() || made.back() == '_' ? "" : "_";
        else
            return {};
    }
    while (made.ends_with('_'))
        made.pop_back();
    return std::find(reserved.begin(), reserved.end(), made) == reserved.end() ? made : std::string();
}

/// A number that is a double in C, in parentheses where a sign stands before it.
std::string literal(const std::string& text) {
    const bool real = text.find_first_of(".e") != std::string::npos;
    const std::string number = real ? text : text + ".0";
    return number.front() == '-' ? "(" + number + ")" : number;
}

std::string head(const std::string& result, const std::string& argument) {
    return "double " + result + "_from_" + argument + "(double " + argument + ")\n{\n";
}

/// The expressions of one function; `in` is the name of its argument.
class Writer {
  public:
    Writer(const PrintedFunction& printed, std::string in) : printed_(printed), logger_(printed.logger), in_(std::move(in)) {}

    [[nodiscard]] std::string body() const {
        switch (logger_.function().family) {
        case F::Constant: return "    (void)" + in_ + ";\n" + returned(n(0));
        case F::Line:
        case F::Proportional:
        case F::Polynomial:
        case F::PolynomialNoConstant: return polynomial();
        case F::SquareRoot: return returned(n(0) + " + " + n(1) + " * sqrt(" + in_ + ")");
        case F::Logarithmic: return returned(n(0) + " + " + n(1) + " * log10(" + in_ + ")");
        case F::Power: return returned(n(0) + " * pow(" + in_ + ", " + n(1) + ")");
        case F::ExponentialApproach: return returned(n(0) + " - " + n(1) + " * exp(-" + in_ + " / " + n(2) + ")");
        case F::CallendarVanDusen: return callendarVanDusen();
        case F::ThermistorB: return returned(n(0) + " * exp(" + n(1) + " * (1.0 / (" + in_ + toKelvin() + ") - 1.0 / 298.15))");
        case F::SteinhartHart: return steinhartHart();
        case F::Nernst: return returned(n(0) + " + " + n(1) + " * (7.0 - " + in_ + ")");
        case F::Table: return table(0, 1);
        }
        return {};
    }

    [[nodiscard]] std::string inverseBody() const {
        switch (logger_.function().family) {
        case F::Line:
        case F::Proportional:
        case F::Polynomial:
        case F::PolynomialNoConstant: return polynomialInverse();
        case F::SquareRoot: return "    const double root = (" + in_ + " - " + n(0) + ") / " + n(1) + ";\n" + returned("root * root");
        case F::Logarithmic: return returned("pow(10.0, (" + in_ + " - " + n(0) + ") / " + n(1) + ")");
        case F::Power: return returned("pow(" + in_ + " / " + n(0) + ", 1.0 / " + n(1) + ")");
        case F::ExponentialApproach: return returned("-" + n(2) + " * log((" + n(0) + " - " + in_ + ") / " + n(1) + ")");
        case F::CallendarVanDusen: {
            const std::string excess = "    const double u = " + in_ + " / " + n(0) + " - 1.0;\n";
            return excess + returned("2.0 * u / (" + n(1) + " + sqrt(" + n(1) + " * " + n(1) + " + 4.0 * " + n(2) + " * u))" + plusZero());
        }
        case F::ThermistorB: return returned("1.0 / (1.0 / 298.15 + log(" + in_ + " / " + n(0) + ") / " + n(1) + ")" + fromKelvin());
        case F::Nernst: return returned("7.0 - (" + in_ + " - " + n(0) + ") / " + n(1));
        case F::Table: return table(1, 0);
        case F::Constant:
        case F::SteinhartHart: break;
        }
        return {};
    }

  private:
    [[nodiscard]] std::string n(std::size_t i) const { return literal(printed_.numbers[i].text); }
    [[nodiscard]] std::size_t count() const { return printed_.numbers.size(); }
    static std::string returned(const std::string& expression) { return "    return " + expression + ";\n"; }

    [[nodiscard]] bool celsius() const { return logger_.constants().zeroCelsius == 0; }
    [[nodiscard]] std::string toKelvin() const { return celsius() ? " + 273.15" : ""; }
    [[nodiscard]] std::string fromKelvin() const { return celsius() ? " - 273.15" : ""; }
    [[nodiscard]] std::string plusZero() const { return celsius() ? "" : " + 273.15"; }

    [[nodiscard]] std::string polynomial() const {
        const bool about = !printed_.centre.empty();
        const std::string u = about ? "u" : in_;
        std::string sum = n(count() - 1);
        for (std::size_t k = count() - 1; k-- > 0;)
            sum = n(k) + " + " + u + " * " + (k + 2 == count() ? sum : "(" + sum + ")");
        if (logger_.withoutConstant())
            sum = u + " * " + (count() == 1 ? sum : "(" + sum + ")");
        const std::string shift = about ? "    const double u = " + in_ + " - " + literal(printed_.centre) + ";\n" : std::string();
        return shift + returned(sum);
    }

    [[nodiscard]] std::string polynomialInverse() const {
        const std::size_t first = logger_.withoutConstant() ? 0 : 1;
        const std::string excess = first == 0 ? in_ : "(" + in_ + " - " + n(0) + ")";
        const std::string b1 = n(first), back = printed_.centre.empty() ? "" : " + " + literal(printed_.centre);
        if (count() == first + 1)
            return returned(excess + " / " + b1 + back);
        const std::string b2 = n(first + 1), sign = logger_.constants().slopeSign < 0 ? "-" : "";
        const std::string root = "    const double root = " + sign + "sqrt(" + b1 + " * " + b1 + " + 4.0 * " + b2 + " * " + excess + ");\n";
        return root + (logger_.rationalRoot() ? returned("2.0 * " + excess + " / (" + b1 + " + root)" + back)
                                              : returned("(root - " + b1 + ") / (2.0 * " + b2 + ")" + back));
    }

    [[nodiscard]] std::string callendarVanDusen() const {
        const std::string t = celsius() ? in_ : "t";
        const std::string shift = celsius() ? std::string() : "    const double t = " + in_ + " - 273.15;\n";
        if (count() < 4)
            return shift + returned(n(0) + " * (1.0 + " + t + " * (" + n(1) + " + " + t + " * " + n(2) + "))");
        const std::string below = "    const double below = " + t + " < 0.0 ? " + n(3) + " * (" + t + " - 100.0) * " + t + " : 0.0;\n";
        return shift + below + returned(n(0) + " * (1.0 + " + t + " * (" + n(1) + " + " + t + " * (" + n(2) + " + below)))");
    }

    [[nodiscard]] std::string steinhartHart() const {
        std::string sum = n(1);
        if (count() == 3)
            sum = n(1) + " + u * u * " + n(2);
        if (count() == 4)
            sum = n(1) + " + u * (" + n(3) + " + u * " + n(2) + ")";
        const std::string product = count() == 2 ? sum : "(" + sum + ")";
        return "    const double u = log(" + in_ + ");\n" + returned("1.0 / (" + n(0) + " + u * " + product + ")" + fromKelvin());
    }

    /// `known`, `wanted`: 0 for the abscissae, 1 for the ordinates.
    [[nodiscard]] std::string table(std::size_t known, std::size_t wanted) const {
        const std::string from(1, "xy"[known]), to(1, "xy"[wanted]), knots = std::to_string(count() / 2);
        const char* reached = known == 1 && logger_.constants().slopeSign < 0 ? " <= " : " >= ";
        std::string text = column("x", 0) + column("y", 1);
        text += "    int i = 0;\n    while (i < " + knots + " - 2 && " + in_ + reached + from + "[i + 1])\n        ++i;\n";
        return text + returned(to + "[i] + (" + in_ + " - " + from + "[i]) / (" + from + "[i + 1] - " + from + "[i]) * (" + to + "[i + 1] - " + to + "[i])");
    }

    [[nodiscard]] std::string column(const std::string& name, std::size_t from) const {
        const std::size_t knots = count() / 2;
        std::string text = "    static const double " + name + "[" + std::to_string(knots) + "] = {";
        for (std::size_t i = 0; i < knots; ++i) {
            text += i % KnotsInALine == 0 ? "\n        " : " ";
            const std::string number = literal(printed_.numbers[2 * i + from].text);
            text += number.front() == '(' ? number.substr(1, number.size() - 2) : number;
            text += i + 1 < knots ? "," : "";
        }
        return text + "\n    };\n";
    }

    const PrintedFunction& printed_;
    const LoggerFunction& logger_;
    std::string in_;
};

std::string halving(const PrintedFunction& printed, const std::string& result, const std::string& argument) {
    const std::string reached = printed.logger.constants().slopeSign < 0 ? " > " : " < ";
    return "    double low = " + literal(printed.low) + ", high = " + literal(printed.high) + ";\n" +
           "    int i;\n    for (i = 0; i < 60; ++i) {\n        const double middle = 0.5 * (low + high);\n        if (" + argument + "_from_" + result +
           "(middle)" + reached + argument + ")\n            low = middle;\n        else\n            high = middle;\n    }\n" +
           "    return 0.5 * (low + high);\n";
}

} // namespace

CodeNames codeNames(const Item& item) {
    const CodeNames names{identifier(item.reference.name), identifier(item.indication.name)};
    const bool usable = !names.reference.empty() && !names.indication.empty() && names.reference != names.indication;
    return usable ? names : CodeNames{"reference", "indication"};
}

std::string functionCode(const PrintedFunction& printed, const CodeNames& names) {
    const bool forward = printed.direction == FitDirection::Indication;
    const std::string& in = forward ? names.reference : names.indication;
    return head(forward ? names.indication : names.reference, in) + Writer(printed, in).body() + "}\n";
}

std::string inverseCode(const PrintedFunction& printed, const CodeNames& names) {
    if (printed.inverse == InverseForm::None)
        return {};
    const bool forward = printed.direction == FitDirection::Indication;
    const std::string& in = forward ? names.indication : names.reference;
    const std::string& out = forward ? names.reference : names.indication;
    return head(out, in) + (printed.inverse == InverseForm::Closed ? Writer(printed, in).inverseBody() : halving(printed, out, in)) + "}\n";
}

} // namespace spanwright
