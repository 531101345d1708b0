// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/fitFunction.h"
#include "tests/support/PublishedSet.h"

#include <QTest>

using namespace spanwright;
using namespace spanwright::test;

namespace {

struct Wanted {
    const char* set;
    const char* reference;
    const char* indication;
    const char* uIndication;
    const char* function;
    const char* prefix; ///< of the names in the set
};

/// Columns as printed in the sets; the source of each stands in tests/published.
const std::vector<Wanted> wantedFits{
    {"norris", "x", "y", "", "line", ""},
    {"noint1", "x", "y", "", "proportional", ""},
    {"noint2", "x", "y", "", "proportional", ""},
    {"filip", "x", "y", "", "polynomial:10", ""},
    {"wampler1", "x", "y", "", "polynomial:5", ""},
    {"wampler2", "x", "y", "", "polynomial:5", ""},
    {"wampler3", "x", "y", "", "polynomial:5", ""},
    {"loadcell", "load", "deflection", "", "line", "line."},
    {"loadcell", "load", "deflection", "", "polynomial:2", "quad."},
    {"iso28037_equal_weights", "x", "y", "u", "line", "line."},
    {"iso28037_unknown_scale", "x", "y", "", "line", "line."},
    {"reaction_chamber", "x", "y", "", "line", "line."},
    {"thermostat", "x", "y", "", "line", "line."},
    {"arsenic_inverse", "x", "y", "", "line", "line."},
    {"toluca_working_hotelling", "x", "y", "", "line", "line."},
    {"r_formaldehyde", "x", "y", "", "line", "line."},
    {"din38402_iron", "x", "y", "", "polynomial:2", "quad."},
};

/// What a set calls a figure, and what the fit gives.
std::vector<std::pair<std::string, double>> figuresOf(const Fit& fit, bool statedScale) {
    std::vector<std::pair<std::string, double>> figures{{"ss_residual", fit.residualSs},
                                                        {"df_residual", fit.degreesOfFreedom}};
    for (std::size_t i = 0; i < fit.terms(); ++i) {
        figures.emplace_back("b" + std::to_string(i), fit.coefficients[i].value);
        figures.emplace_back("sd_b" + std::to_string(i), fit.coefficients[i].standardUncertainty);
    }
    if (fit.terms() > 1)
        figures.emplace_back("cov_b0_b1", fit.covariance[1]);
    if (statedScale) {
        figures.emplace_back("chi2", *fit.chiSquared);
        return figures;
    }
    figures.emplace_back("residual_sd", fit.residualSd);
    figures.emplace_back("ss_regression", fit.regressionSs);
    figures.emplace_back("df_regression", fit.regressionDf);
    figures.emplace_back("r2", *fit.rSquared);
    return figures;
}

} // namespace

class PublishedFits : public QObject {
    Q_OBJECT

  private slots:
    void agreesToFifteenDigits_data() {
        QTest::addColumn<int>("index");
        for (std::size_t i = 0; i < wantedFits.size(); ++i)
            QTest::addRow("%s %s", wantedFits[i].set, wantedFits[i].function) << static_cast<int>(i);
    }
    void agreesToFifteenDigits() {
        QFETCH(int, index);
        const Wanted& wanted = wantedFits[static_cast<std::size_t>(index)];
        const PublishedSet set = publishedSet(wanted.set);
        Record record = recordOf(set, {wanted.reference, wanted.indication, "", "", wanted.uIndication});
        record.choices.function = *parseFunctionName(wanted.function);
        const bool stated = *wanted.uIndication != '\0';
        if (stated) {
            record.choices.weights = Weights::Stated;
            record.choices.covariance = CovarianceScale::Stated;
        }
        const auto outcome = fitFunction(makeSample(record, Phase::AsFound), record.choices);
        QVERIFY(outcome.ok());
        int compared = 0;
        for (const auto& [name, got] : figuresOf(outcome->fit, stated)) {
            const auto want = set.recomputed.find(wanted.prefix + name);
            if (want == set.recomputed.end())
                continue;
            compared += 1;
            const double digits = digitsAgreed(got, want->second);
            QVERIFY2(digits >= 14.999, qPrintable(QString("%1: got %2, wanted %3, %4 digits")
                                                      .arg(QString::fromStdString(name))
                                                      .arg(got, 0, 'g', 17)
                                                      .arg(QString::fromStdString(want->second))
                                                      .arg(digits)));
            const auto printed = set.published.find(wanted.prefix + name);
            if (printed != set.published.end() && set.id != "loadcell")
                QVERIFY2(agreesAsPrinted(got, printed->second), printed->second.c_str());
        }
        QVERIFY(compared >= 5);
    }

    void meanAndSpreadOfOneQuantity_data() {
        QTest::addColumn<QString>("id");
        for (const char* id : {"mavro", "michelso", "numacc3"})
            QTest::newRow(id) << id;
    }
    void meanAndSpreadOfOneQuantity() {
        QFETCH(QString, id);
        const PublishedSet set = publishedSet(id);
        Record record = recordOf(set, {"", "y", "", "", ""});
        record.choices.function = {FunctionFamily::Constant, 0};
        const auto outcome = fitFunction(makeSample(record, Phase::AsFound), record.choices);
        QVERIFY(outcome.ok());
        QVERIFY(digitsAgreed(outcome->fit.coefficients[0].value, set.recomputed.at("mean")) >= 14.999);
        QVERIFY(digitsAgreed(outcome->fit.residualSd, set.recomputed.at("sd")) >= 14.999);
        QVERIFY(digitsAgreed(outcome->fit.coefficients[0].standardUncertainty, set.recomputed.at("sd_of_mean")) >=
                14.999);
    }

    /// JCGM 100:2008, H.3: the abscissa is t − 20 °C; y1, y2, s(y1), s(y2), r, b(30 °C) and its u as printed in H.3.4
    /// and H.3.5.
    void correctionOfAThermometer() {
        const PublishedSet set = publishedSet("gum_h3");
        std::vector<std::string> shifted;
        for (const std::string& t : set.column("t")) {
            const auto value = Decimal::parse(t);
            shifted.push_back(Decimal{value->mantissa - 20'000, 3, {}}.text());
        }
        Record record = recordOf(shifted, set.column("b"));
        const auto outcome = fitFunction(makeSample(record, Phase::AsFound), record.choices);
        QVERIFY(outcome.ok());
        const Fit& fit = outcome->fit;
        QVERIFY(agreesAsPrinted(fit.coefficients[0].value, "-0.1712"));
        QVERIFY(agreesAsPrinted(fit.coefficients[1].value, "0.00218"));
        QVERIFY(agreesAsPrinted(fit.coefficients[0].standardUncertainty, "0.0029"));
        QVERIFY(agreesAsPrinted(fit.coefficients[1].standardUncertainty, "0.00067"));
        QVERIFY(agreesAsPrinted(fit.residualSd, "0.0035"));
        const double r =
            fit.covariance[1] / (fit.coefficients[0].standardUncertainty * fit.coefficients[1].standardUncertainty);
        QVERIFY(agreesAsPrinted(r, "-0.930"));
        QVERIFY(agreesAsPrinted(fit.curve->value(10.0), "-0.1494"));
        QVERIFY(agreesAsPrinted(std::sqrt(fit.curve->variance(10.0)), "0.0041"));
        for (const auto& [name, got] : {std::pair{"line.b0", fit.coefficients[0].value},
                                        {"line.cov_b0_b1", fit.covariance[1]},
                                        {"b30.fit", fit.curve->value(10.0)},
                                        {"b30.se_fit", std::sqrt(fit.curve->variance(10.0))}})
            QVERIFY2(digitsAgreed(got, set.recomputed.at(name)) >= 14.5, name);
    }
};

QTEST_APPLESS_MAIN(PublishedFits)
#include "tst_published_fits.moc"
