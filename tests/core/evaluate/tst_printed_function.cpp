// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/budget/ReadBackBudget.h"
#include "core/evaluate/Calibration.h"
#include "core/evaluate/FunctionCode.h"
#include "core/evaluate/evaluate.h"
#include "tests/support/FitHelp.h"
#include "tests/support/SampleRecord.h"
#include "ui/words/CoefficientText.h"

#include <QLibrary>
#include <QProcess>
#include <QStandardPaths>
#include <QTemporaryDir>
#include <QtTest>

#include <cmath>
#include <functional>

using namespace spanwright;
using namespace spanwright::test;

namespace {

struct Case {
    const char* name;
    const char* function;
    std::vector<double> x;
    std::function<double(double)> f;
    double noise = 0; ///< share of the ordinate's span by which readings lie above and below it
    FitDirection direction = FitDirection::Indication;
    const char* unit = "";
};

std::vector<double> steps(double low, double high, int count) {
    std::vector<double> x;
    for (int i = 0; i < count; ++i)
        x.push_back(low + (high - low) * i / (count - 1));
    return x;
}

double callendar(double t) {
    return 100 * (1 + 3.9083e-3 * t - 5.775e-7 * t * t + (t < 0 ? -4.183e-12 * (t - 100) * t * t * t : 0.0));
}

/// Every family, rising and falling, and polynomials whose powers of x cancel each other.
std::vector<Case> cases() {
    const auto reference = FitDirection::Reference;
    return {
        {"constant", "constant", steps(0, 5, 6), [](double) { return 12.3456; }, 1e-4},
        {"line", "line", steps(0, 10, 6), [](double x) { return 4 + 1.6 * x; }, 3e-4},
        {"falling line", "line", steps(-40, 85, 6), [](double x) { return 0.7612 - 0.00211 * x; }, 1e-3},
        {"line of the reference", "line", steps(4, 20, 6), [](double x) { return -2.5 + 0.625 * x; }, 1e-4, reference},
        {"proportional", "proportional", steps(1, 10, 6), [](double x) { return 2.0004 * x; }, 1e-4},
        {"quadratic", "polynomial:2", steps(0, 50, 6), [](double x) { return 0.0021 + 0.04 * x - 3.1e-6 * x * x; }, 2e-5},
        {"quadratic beyond its turning point", "polynomial:2", steps(6, 12, 6), [](double x) { return (x - 5) * (x - 5); }, 1e-4},
        {"falling quadratic", "polynomial:2", steps(0, 4, 6), [](double x) { return 30.123 - 2.0417 * x - 0.31472 * x * x; }, 1e-4},
        {"quadratic that turns", "polynomial:2", steps(-3, 3, 7), [](double x) { return 1.234 + 0.1 * x + 1.0567 * x * x; }, 1e-4},
        {"cubic without a constant", "polynomial-no-constant:3", steps(1, 6, 6), [](double x) { return x * (2.1234 + x * (-0.10345 + 0.0031234 * x)); }, 1e-5},
        {"quadratic without a constant", "polynomial-no-constant:2", steps(1, 6, 6), [](double x) { return x * (2.1234 - 0.10345 * x); }, 1e-4},
        {"degree 5 of the reference", "polynomial:5", steps(0, 2, 9), [](double x) { return 10 * std::sin(0.7 * x); }, 1e-6, reference},
        {"far from zero", "polynomial:4", steps(20000, 20001, 9), [](double x) { return 3 + std::exp(x - 20000); }, 1e-5},
        {"square root", "square-root", {0.0, 1, 4, 9, 16, 25}, [](double x) { return 0.5123 + 3.1415 * std::sqrt(x); }, 1e-4},
        {"logarithmic", "logarithmic", {0.01, 0.1, 1, 10, 100}, [](double x) { return 200 - 58 * std::log10(x); }, 1e-4},
        {"power", "power", {1, 2, 5, 10, 20, 50}, [](double x) { return 3.5 * std::pow(x, -0.62); }, 1e-4},
        {"exponential approach", "exponential-approach", {0, 5, 10, 20, 40, 60, 90}, [](double x) { return 9.5 - 8 * std::exp(-x / 25); }, 1e-5},
        {"platinum above 0 °C", "callendar-van-dusen", {0, 50, 100, 250, 400}, callendar, 1e-5, FitDirection::Indication, "°C"},
        {"platinum on both sides", "callendar-van-dusen", {-180, -100, -50, 0, 100, 250, 400}, callendar, 1e-5, FitDirection::Indication, "°C"},
        {"platinum in kelvin", "callendar-van-dusen", {93.15, 173.15, 223.15, 273.15, 373.15, 523.15}, [](double t) { return callendar(t - 273.15); },
         1e-5, FitDirection::Indication, "K"},
        {"thermistor", "thermistor-b", {-20, 0, 25, 50, 85}, [](double t) { return 10000 * std::exp(3435 * (1 / (t + 273.15) - 1 / 298.15)); }, 1e-5,
         FitDirection::Indication, "°C"},
        {"Steinhart and Hart, 2 terms", "steinhart-hart:2", {800, 2000, 10000, 30000}, [](double r) { return 1 / (1.1e-3 + 2.4e-4 * std::log(r)) - 273.15; }, 1e-5, reference, "°C"},
        {"Steinhart and Hart, 3 terms", "steinhart-hart:3", {800, 2000, 5000, 10000, 30000},
         [](double r) { const double l = std::log(r); return 1 / (1.1e-3 + 2.4e-4 * l + 8e-8 * l * l * l) - 273.15; }, 1e-5, reference, "°C"},
        {"Steinhart and Hart, 4 terms", "steinhart-hart:4", {800, 2000, 5000, 10000, 30000, 60000},
         [](double r) { const double l = std::log(r); return 1 / (1.1e-3 + 2.4e-4 * l + 8e-8 * l * l * l + 1e-7 * l * l); }, 1e-5, reference, "K"},
        {"pH electrode", "nernst", {1.68, 4.01, 6.86, 9.18}, [](double pH) { return 2 - 57.4 * (pH - 7); }, 1e-4},
        {"table", "table", {0, 1, 2.5, 4, 7}, [](double x) { return 1 + x + 0.02 * x * x; }, 1e-4},
        {"falling table", "table", {0, 1, 2.5, 4, 7}, [](double x) { return 9.1234 - 1.0417 * x - 0.0123 * x * x; }, 1e-4},
    };
}

/// Two readings at every abscissa, above and below the function in turn by unequal amounts.
Record madeRecord(const Case& made) {
    std::vector<double> x, y;
    const double span = std::fabs(made.f(made.x.back()) - made.f(made.x.front()));
    const double step = made.noise * (span > 0 ? span : 1);
    for (std::size_t i = 0; i < made.x.size(); ++i)
        for (const double side : {1.0, -1.0}) {
            x.push_back(made.x[i]);
            y.push_back(made.f(made.x[i]) + side * step * (1 + 0.3 * static_cast<double>(i % 3)));
        }
    const bool forward = made.direction == FitDirection::Indication;
    Record record = forward ? recordOf({typed(x), typed(y), {}, {}}) : recordOf({typed(y), typed(x), {}, {}});
    record.choices.function = *parseFunctionName(made.function);
    record.choices.fit = made.direction;
    record.item.reference.unit = made.unit;
    return record;
}

struct Printed {
    Record record;
    PhaseEvaluation phase;
    PrintedFunction function;
};

Printed printedOf(const Record& record) {
    Progress progress;
    const auto evaluation = evaluate(record, progress);
    const PhaseEvaluation* phase = calibrationOf(*evaluation, record.choices.phase);
    if (phase == nullptr)
        qFatal("no fit");
    return {record, *phase, *printedFunction(record, *phase)};
}

/// The largest error of a value as a share of its U, on a grid that has nothing to do with the one on which the digits were chosen.
double largestShare(const Printed& printed, const LoggerFunction& logger) {
    const Fit& fit = *printed.phase.fit;
    double largest = 0;
    for (int i = 0; i <= 3001; ++i) {
        const double x = fit.low + (fit.high - fit.low) * i / 3001.0;
        const auto budget = readBackBudget(printed.record, fit, x);
        if (!budget)
            continue;
        const double u = fit.direction == FitDirection::Indication ? budget->expanded : budget->expandedReference;
        largest = std::max(largest, std::fabs(logger.value(x) - fit.curve->value(x)) / u);
    }
    return largest;
}

int digitsIn(const std::string& text) {
    int digits = 0;
    for (const char c : text.substr(0, text.find('e')))
        digits += c >= '0' && c <= '9' && (digits > 0 || c != '0') ? 1 : 0;
    return digits;
}

using Evaluator = double (*)(double);

} // namespace

class TestPrintedFunction : public QObject {
    Q_OBJECT

  private slots:
    void everyValueIsWithinATwentiethOfItsU_data() { all(); }
    void everyValueIsWithinATwentiethOfItsU();
    void oneDigitFewerBreaksTheBound_data() { all(); }
    void oneDigitFewerBreaksTheBound();
    void theCTextCompilesAndGivesTheSame_data() { all(); }
    void theCTextCompilesAndGivesTheSame();
    void theTextSaysTheChecksThatTheNumbersGive();
    void platinumTableComesOutAsPrinted();
    void withoutAnUncertaintyTheNumbersStandInFull();
    void namesInCAreTakenFromTheQuantities();
    void hostileTextStaysInTheComment();

  private:
    static void all() {
        QTest::addColumn<int>("index");
        const auto every = cases();
        for (std::size_t i = 0; i < every.size(); ++i)
            QTest::newRow(every[i].name) << static_cast<int>(i);
    }
    static Printed at(int index) { return printedOf(madeRecord(cases()[static_cast<std::size_t>(index)])); }
};

void TestPrintedFunction::everyValueIsWithinATwentiethOfItsU() {
    QFETCH(int, index);
    const Printed printed = at(index);
    QVERIFY(printed.function.share.has_value());
    QVERIFY(*printed.function.share <= PrintedShareOfU);
    const double share = largestShare(printed, printed.function.logger);
    QVERIFY2(share <= PrintedShareOfU, qPrintable(QString::number(share)));
    const std::string name = cases()[static_cast<std::size_t>(index)].name;
    QCOMPARE(printed.function.centre.empty(), name != "far from zero");
    QCOMPARE(printed.function.inverse == InverseForm::None, name == "constant" || name == "quadratic that turns");
    // The inverse leads back to the abscissa within a twentieth of U there.
    const Fit& fit = *printed.phase.fit;
    for (int i = 1; i < 200 && printed.function.inverse != InverseForm::None; ++i) {
        const double x = fit.low + (fit.high - fit.low) * i / 200.0, y = fit.curve->value(x);
        const double back = printed.function.inverse == InverseForm::Closed ? printed.function.logger.inverse(y)
                                                                            : printed.function.logger.halvedInverse(y, fit.low, fit.high);
        const auto budget = readBackBudget(printed.record, fit, x);
        const double u = fit.direction == FitDirection::Indication ? budget->expandedReference : budget->expanded;
        QVERIFY2(std::fabs(back - x) <= 1.001 * PrintedShareOfU * u, qPrintable(QString("%1: %2").arg(x).arg(back - x)));
    }
}

void TestPrintedFunction::oneDigitFewerBreaksTheBound() {
    QFETCH(int, index);
    const Printed printed = at(index);
    const FunctionFamily family = printed.function.logger.function().family;
    if (family == FunctionFamily::Constant)
        return;
    const std::vector<PrintedNumber>& texts = printed.function.numbers;
    // Numbers of a table have their decimals in common; elsewhere each number alone can lose none.
    const std::size_t together = family == FunctionFamily::Table ? 2 : texts.size();
    int tried = 0;
    for (std::size_t i = 0; i < together; ++i) {
        std::vector<double> numbers = printed.function.logger.numbers();
        bool shorter = false;
        for (std::size_t k = 0; k < texts.size(); ++k) {
            const bool mine = family == FunctionFamily::Table ? k % 2 == i : k == i;
            const int digits = digitsIn(texts[k].text);
            if (!mine || digits < 2)
                continue;
            numbers[k] = std::stod(QString::number(numbers[k], 'e', digits - 2).toStdString());
            shorter = true;
        }
        if (!shorter)
            continue;
        ++tried;
        const LoggerFunction logger(printed.function.logger.function(), printed.function.logger.constants(), numbers);
        double share = largestShare(printed, logger);
        if (printed.function.inverse == InverseForm::Closed) {
            const Fit& fit = *printed.phase.fit;
            for (int k = 0; k <= 3001; ++k) {
                const double x = fit.low + (fit.high - fit.low) * k / 3001.0;
                const auto budget = readBackBudget(printed.record, fit, x);
                const double u = !budget ? INFINITY : fit.direction == FitDirection::Indication ? budget->expandedReference : budget->expanded;
                share = std::max(share, std::fabs(logger.inverse(fit.curve->value(x)) - x) / u);
            }
        }
        QVERIFY2(!(share <= 0.99 * PrintedShareOfU), qPrintable(QString("%1 = %2: %3").arg(QString::fromStdString(texts[i].name), QString::fromStdString(texts[i].text)).arg(share)));
    }
    QVERIFY(tried > 0);
}

void TestPrintedFunction::theCTextCompilesAndGivesTheSame() {
    QFETCH(int, index);
    const QString compiler = QStandardPaths::findExecutable(QStringLiteral("cc"));
    if (compiler.isEmpty())
        QSKIP("there is no C compiler here");
    const Printed printed = at(index);
    QTemporaryDir folder;
    const QString source = folder.filePath(QStringLiteral("f.c")), made = folder.filePath(QStringLiteral("f.so"));
    QFile file(source);
    QVERIFY(file.open(QIODevice::WriteOnly));
    file.write(coefficientText(printed.record, printed.function, CoefficientForm::C).toUtf8());
    file.close();
    QProcess compile;
    compile.start(compiler, {"-std=c99", "-pedantic", "-Wall", "-Wextra", "-Wconversion", "-Werror", "-ffp-contract=off", "-shared", "-fPIC", "-o", made, source, "-lm"});
    QVERIFY(compile.waitForFinished());
    QVERIFY2(compile.exitCode() == 0, compile.readAllStandardError().constData());
    QLibrary library(made);
    const bool forward = printed.function.direction == FitDirection::Indication;
    const auto f = reinterpret_cast<Evaluator>(library.resolve(forward ? "indication_from_reference" : "reference_from_indication"));
    const auto back = reinterpret_cast<Evaluator>(library.resolve(forward ? "reference_from_indication" : "indication_from_reference"));
    QVERIFY2(f != nullptr, qPrintable(library.errorString()));
    QCOMPARE(back != nullptr, printed.function.inverse != InverseForm::None);
    const Fit& fit = *printed.phase.fit;
    const double size = std::max(std::fabs(f(fit.low)), std::fabs(f(fit.high))), span = fit.high - fit.low;
    for (int i = 0; i <= 500; ++i) {
        const double x = fit.low + span * i / 500.0;
        QVERIFY2(std::fabs(f(x) - printed.function.logger.value(x)) <= 4e-15 * size, qPrintable(QString::number(x)));
        if (back != nullptr && i > 0 && i < 500)
            QVERIFY2(std::fabs(back(f(x)) - x) <= 1e-9 * (span + std::fabs(x)), qPrintable(QString::number(back(f(x)) - x)));
    }
    for (const PrintedCheck& check : printed.function.checks)
        QVERIFY(agreesAsPrinted(f(std::stod(check.input)), check.output));
    for (const PrintedCheck& check : printed.function.inverseChecks)
        QVERIFY2(agreesAsPrinted(back(std::stod(check.input)), check.output), check.output.c_str());
    library.unload();
}

void TestPrintedFunction::theTextSaysTheChecksThatTheNumbersGive() {
    const Printed printed = printedOf(pressureTransmitter());
    QCOMPARE(printed.function.numbers.size(), std::size_t{2});
    QCOMPARE(printed.function.checks.size(), std::size_t{3});
    const QString plain = coefficientText(printed.record, printed.function, CoefficientForm::Plain);
    const QString csv = coefficientText(printed.record, printed.function, CoefficientForm::Csv);
    const double b0 = std::stod(printed.function.numbers[0].text), b1 = std::stod(printed.function.numbers[1].text);
    for (const PrintedCheck& check : printed.function.checks) {
        QVERIFY(agreesAsPrinted(b0 + b1 * std::stod(check.input), check.output));
        QVERIFY(plain.contains(QString::fromStdString(check.input + " bar")));
        QVERIFY(plain.contains(QString::fromStdString(check.output + " mA")));
    }
    QVERIFY(plain.contains(QStringLiteral("Valid only for pressure from -0.0011 bar to 10.0007 bar.")));
    for (const QString& text : {plain, csv, coefficientText(printed.record, printed.function, CoefficientForm::C)}) {
        QVERIFY(text.contains(QStringLiteral("it is not a calibration certificate")));
        QVERIFY(text.contains(QStringLiteral("NV-20318")));
    }
    QVERIFY(csv.startsWith(QStringLiteral("kind,name,value,unit\n")));
    QVERIFY(csv.contains(QString::fromStdString("coefficient,b1," + printed.function.numbers[1].text + ",mA/bar\n")));
}

/// IEC 60751: fitted to the table as printed (0.01 Ω), what a logger computes rounds to the table again within half a unit.
void TestPrintedFunction::platinumTableComesOutAsPrinted() {
    const PublishedSet set = publishedSet("iec60751_pt100");
    std::vector<std::string> t, r;
    for (const auto& row : set.rows) {
        t.push_back(row[0]);
        r.push_back(set.published.at("R[" + row[0] + "]"));
    }
    Record record = recordOf({t, r, {}, {}});
    record.choices.function = {FunctionFamily::CallendarVanDusen, 0};
    record.item.reference.unit = "°C";
    const Printed printed = printedOf(record);
    QVERIFY(!t.empty());
    for (const std::string& at : t) {
        const double exact = std::stod(set.recomputed.at("R[" + at + "]"));
        QVERIFY2(std::fabs(printed.function.logger.value(std::stod(at)) - exact) < 0.005, at.c_str());
        QVERIFY2(std::fabs(printed.function.logger.halvedInverse(exact, -200, 850) - std::stod(at)) < 0.005 / 0.29, at.c_str());
    }
}

void TestPrintedFunction::withoutAnUncertaintyTheNumbersStandInFull() {
    Record record = recordOf({{"1", "3"}, {"0.1", "0.4"}, {}, {}});
    const Printed printed = printedOf(record);
    QVERIFY(!printed.function.share);
    for (std::size_t i = 0; i < printed.function.numbers.size(); ++i)
        QCOMPARE(std::stod(printed.function.numbers[i].text), printed.phase.fit->coefficients[i].value);
    QVERIFY(coefficientText(record, printed.function, CoefficientForm::Plain).contains(QStringLiteral("No uncertainty is known")));
}

void TestPrintedFunction::namesInCAreTakenFromTheQuantities() {
    Item item;
    item.reference.name = "Flow rate";
    item.indication.name = "voltage";
    QCOMPARE(codeNames(item).reference, std::string("flow_rate"));
    QCOMPARE(codeNames(item).indication, std::string("voltage"));
    for (const char* unfit : {"", "double", "Größe", "voltage", "2", "log", "low"}) {
        item.reference.name = unfit;
        QCOMPARE(codeNames(item).reference, std::string("reference"));
        QCOMPARE(codeNames(item).indication, std::string("indication"));
    }
}

void TestPrintedFunction::hostileTextStaysInTheComment() {
    Record record = pressureTransmitter();
    record.item.description = "cell */ int main(void) { return 1; } /*\n#error";
    const Printed printed = printedOf(record);
    const QString c = coefficientText(record, printed.function, CoefficientForm::C);
    QVERIFY(c.indexOf(QStringLiteral("*/")) > c.indexOf(QStringLiteral("caution")));
    QCOMPARE(c.left(c.indexOf(QStringLiteral("*/"))).count(QStringLiteral("int main")), 1);
    QVERIFY(!c.contains(QStringLiteral("\n#error")));
    QVERIFY(!coefficientText(record, printed.function, CoefficientForm::Plain).contains(QStringLiteral("\n#error")));
}

QTEST_GUILESS_MAIN(TestPrintedFunction)
#include "tst_printed_function.moc"
