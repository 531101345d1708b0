// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/Paths.h"
#include "tests/support/RunCommand.h"

#include <QtTest>

#include <boost/multiprecision/cpp_dec_float.hpp>

#include <QDir>
#include <QJsonArray>
#include <QJsonDocument>
#include <QRegularExpression>

#include <algorithm>
#include <cmath>
#include <optional>

using namespace spanwright::test;

namespace {

using Wide = boost::multiprecision::number<boost::multiprecision::cpp_dec_float<60>>;

/// −log10 of the relative difference, on the decimals as printed, at most 15; an expected 0 counts as met below 10⁻¹².
double digits(const QJsonValue& got, const QString& expected) {
    if (!got.isDouble())
        return 0;
    const Wide want(expected.toStdString());
    const Wide have(QByteArray::number(got.toDouble(), 'g', 17).toStdString());
    if (want == have)
        return 15;
    if (want == 0)
        return abs(have) < Wide("1e-12") ? 15 : 0;
    const Wide error = abs((have - want) / want);
    return std::clamp(-static_cast<double>(log10(error)), 0.0, 15.0);
}

/// "split.residual.ss", "coefficients.0.value": a number of the figures.
QJsonValue at(const QJsonObject& figures, const QString& path) {
    QJsonValue value = figures;
    for (const QString& step : path.split(QLatin1Char('.')))
        value = value.isArray() ? value.toArray().at(step.toInt()) : value.toObject().value(step);
    return value;
}

/// One set of tests/published and the figures that the program gives for it, task by task.
class PublishedCase {
  public:
    explicit PublishedCase(const QJsonObject& set)
        : columns_(texts(set["columns"].toArray())), rows_(set["rows"].toArray()), recomputed_(set["recomputed"].toObject()) {}

    void task(const QJsonObject& task) {
        task_ = task;
        kind_ = task["do"].toString();
        label_ = task.contains("as") ? task["as"].toString() + QLatin1Char('.') : QString();
        if (kind_ == "fit")
            fit();
        else if (kind_ == "univariate" || kind_ == "esd" || kind_ == "grubbs" || (kind_ == "shapiro" && task.contains("column")))
            single();
        else if (kind_ == "line_xy")
            bothUncertain();
        else if (kind_ == "anova1" || kind_ == "homogeneity")
            grouped();
        else if (!line_.isEmpty())
            ofLastFit();
    }

    int compared = 0;
    QStringList below; ///< figures that agree on too few digits

  private:
    static QStringList texts(const QJsonArray& array) {
        QStringList list;
        for (const QJsonValue& value : array)
            list << value.toString();
        return list;
    }

    /// A column of the set, or one of a few functions of it, in decimals.
    std::optional<QString> cell(const QString& expression, const QJsonArray& row) const {
        const auto known = [&](const QString& name) { return columns_.contains(name); };
        const auto text = [&](const QString& name) { return row.at(static_cast<int>(columns_.indexOf(name))).toString(); };
        if (known(expression))
            return text(expression);
        static const QRegularExpression shifted("^(\\w+)-([\\d.]+)$"), weight("^1/(\\w+)\\^2$"), root("^1/sqrt\\((\\w+)\\)$");
        const auto number = [&](const QString& name) { return Wide(text(name).toStdString()); };
        if (const auto m = shifted.match(expression); m.hasMatch() && known(m.captured(1)))
            return QString::fromStdString(Wide(number(m.captured(1)) - Wide(m.captured(2).toStdString())).str());
        if (const auto m = weight.match(expression); m.hasMatch() && known(m.captured(1)))
            return text(m.captured(1));
        if (const auto m = root.match(expression); m.hasMatch() && known(m.captured(1)))
            return QString::fromStdString(Wide(1 / sqrt(number(m.captured(1)))).str(17));
        return std::nullopt;
    }

    /// Writes a table of the expressions; false when one of them cannot be made.
    bool write(const QStringList& head, const QStringList& expressions) {
        QByteArray text = head.join(QLatin1Char(',')).toUtf8() + '\n';
        for (const QJsonValue& row : rows_) {
            QStringList cells;
            for (const QString& expression : expressions) {
                const auto value = cell(expression, row.toArray());
                if (!value)
                    return false;
                cells << *value;
            }
            text += cells.join(QLatin1Char(',')).toUtf8() + '\n';
        }
        file_ = desk_.file(QStringLiteral("set%1.csv").arg(++tables_), text);
        return true;
    }

    QJsonObject figures(const QStringList& options) {
        std::vector<std::string> words{"figures", file_, "--json"};
        for (const QString& option : options)
            words.push_back(option.toStdString());
        const Ran ran = runWords(words);
        if (ran.status != 0)
            below << QString::fromStdString(ran.err);
        return ran.json();
    }

    void compare(const QString& key, const QJsonValue& got) {
        const QString name = label_ + key;
        if (!recomputed_.contains(name) || recomputed_[name].toString().startsWith(QLatin1String("inf"), Qt::CaseInsensitive))
            return;
        static const QStringList exact{"fit", "lack_of_fit", "anova1", "univariate"};
        const QString last = name.section(QLatin1Char('.'), -1);
        const bool tail = last == "p" || last == "p_F" || last == "p_positive" || last.endsWith("_p");
        const double least = tail ? 8 : exact.contains(kind_) ? 15 : 12;
        const double agreed = digits(got, recomputed_[name].toString());
        ++compared;
        if (agreed < least)
            below << QStringLiteral("%1 %2 digits").arg(name).arg(agreed);
    }

    void compare(std::initializer_list<std::pair<const char*, const char*>> keys, const QJsonObject& got) {
        for (const auto& [key, path] : keys)
            compare(QString::fromLatin1(key), at(got, QString::fromLatin1(path)));
    }

    /// A polynomial in one variable: its name as a function, and the variable.
    std::optional<QString> functionOf(const QStringList& terms) {
        const bool constant = terms.first() == "1";
        const QStringList powers = constant ? terms.mid(1) : terms;
        static const QRegularExpression notPowers("log|/|\\*");
        if (powers.isEmpty() || powers.join(QLatin1Char(' ')).contains(notPowers))
            return std::nullopt;
        variable_ = powers.first();
        for (int i = 1; i < powers.size(); ++i)
            if (powers[i] != variable_ + QLatin1Char('^') + QString::number(i + 1))
                return std::nullopt;
        if (powers.size() == 1)
            return constant ? "line" : "proportional";
        return (constant ? "polynomial:" : "polynomial-no-constant:") + QString::number(powers.size());
    }

    void fit() {
        line_.clear();
        const QStringList terms = texts(task_["terms"].toArray());
        const auto function = functionOf(terms);
        if (!function)
            return;
        QStringList head{"reference", "indication"}, expressions{variable_, task_["response"].toString()};
        QStringList options{"--reference", "reference", "--indication", "indication", "--function", *function};
        const bool known = task_["sigma"].toString() == "known";
        if (task_.contains("weights")) {
            const QString weight = task_["weights"].toString();
            head << "u";
            expressions << (weight.startsWith("1/") ? weight : "1/sqrt(" + weight + ")");
            options << "--u-indication" << "u" << "--weights" << "stated" << "--covariance" << (known ? "stated" : "residuals");
        }
        if (!write(head, expressions))
            return;
        line_ = options;
        lineFile_ = file_;
        const QJsonObject got = figures(options);
        for (int i = 0; i < terms.size(); ++i) {
            compare(QStringLiteral("b%1").arg(i), at(got, QStringLiteral("coefficients.%1.value").arg(i)));
            compare(QStringLiteral("sd_b%1").arg(i), at(got, QStringLiteral("coefficients.%1.standard_uncertainty").arg(i)));
        }
        compare({{"df_residual", "degrees_of_freedom"}, {"chi2", "chi_squared"}}, got);
        if (!known)
            compare({{"ss_residual", "split.residual.ss"}, {"residual_sd", "residual_sd"}, {"ss_regression", "split.regression.ss"},
                     {"r2", "r_squared"}, {"F", "split.regression.f"}, {"p_F", "split.regression.p"}}, got);
    }

    void ofLastFit() {
        file_ = lineFile_;
        if (kind_ == "lack_of_fit" && task_["group"].toString() == variable_) {
            compare({{"ss_pure_error", "split.pure_error.ss"}, {"ss_lack_of_fit", "split.lack_of_fit.ss"}, {"F", "split.lack_of_fit.f"},
                     {"p", "split.lack_of_fit.p"}}, figures(line_ + QStringList{"--set-point", "reference"}));
        } else if (kind_ == "predict") {
            const QString shift = variable_.contains(QLatin1Char('-')) ? variable_.section(QLatin1Char('-'), 1) : QStringLiteral("0");
            const Wide x = Wide(task_["at"].toArray()[0].toString().toStdString()) - Wide(shift.toStdString());
            compare({{"fit", "at.0.indication"}, {"ci_lower", "at.0.mean.low"}, {"ci_upper", "at.0.mean.high"},
                     {"pi_lower", "at.0.new_reading.low"}, {"pi_upper", "at.0.new_reading.high"}},
                    figures(line_ + QStringList{"--at=" + QString::fromStdString(x.str()), "--coverage", task_["level"].toString()}));
        } else if (kind_ == "invert") {
            invert();
        } else if (kind_ == "working_hotelling") {
            const QStringList places = texts(task_["at"].toArray());
            const QJsonObject got = figures(line_ + QStringList{"--at=" + places.join(QLatin1Char(',')), "--coverage", task_["level"].toString()});
            for (int i = 0; i < places.size(); ++i) {
                compare("lower[" + places[i] + "]", at(got, QStringLiteral("at.%1.simultaneous.low").arg(i)));
                compare("upper[" + places[i] + "]", at(got, QStringLiteral("at.%1.simultaneous.high").arg(i)));
            }
        } else if (kind_ == "influence") {
            const QJsonObject got = figures(line_ + QStringList{"--rows"});
            for (const QJsonValue& row : task_["rows"].toArray())
                for (const auto& [key, field] : {std::pair{"leverage", "leverage"}, {"standardised_residual", "standardised"},
                                                 {"studentised_residual", "studentised"}, {"cook", "cook"}})
                    compare(QStringLiteral("%1[%2]").arg(key).arg(row.toVariant().toString()),
                            at(got, QStringLiteral("rows.%1.%2").arg(row.toVariant().toInt() - 1).arg(field)));
        } else {
            diagnostics(figures(line_));
        }
    }

    void invert() {
        if (task_["pool"].toVariant().toBool() || task_.contains("obs_weight") || !recomputed_.contains(label_ + "lower"))
            return;
        Wide sum = 0;
        const QStringList readings = texts(task_["y0"].toArray());
        for (const QString& reading : readings)
            sum += Wide(reading.toStdString());
        const Wide mean = sum / Wide(static_cast<int>(readings.size()));
        const QString repeats = task_["kind"].toString() == "mean" ? QStringLiteral("inf") : QString::number(readings.size());
        compare({{"x0", "read.0.reference"}, {"lower", "read.0.low"}, {"upper", "read.0.high"}},
                figures(line_ + QStringList{"--read=" + QString::fromStdString(mean.str(28)), "--repeats", repeats, "--coverage",
                                            task_["level"].toString()}));
    }

    void diagnostics(const QJsonObject& got) {
        if (kind_ == "shapiro")
            compare({{"W", "diagnostics.shapiro_wilk.w"}, {"p", "diagnostics.shapiro_wilk.p"}}, got);
        else if (kind_ == "breusch_pagan")
            compare({{"BP", "diagnostics.breusch_pagan.statistic"}, {"p", "diagnostics.breusch_pagan.p"}}, got);
        else if (kind_ == "dw_test" || kind_ == "durbin_watson")
            compare({{"d", "diagnostics.durbin_watson.d"}, {"p_positive", "diagnostics.durbin_watson.p_positive"}}, got);
        else if (kind_ == "linearity")
            compare({{"F", "diagnostics.linearity.f"}, {"p", "diagnostics.linearity.p"}}, got);
    }

    void bothUncertain() {
        if (!write({"x", "y", "ux", "uy"}, {task_["x"].toString(), task_["y"].toString(), task_["ux"].toString(), task_["uy"].toString()}))
            return;
        compare({{"a", "coefficients.0.value"}, {"b", "coefficients.1.value"}, {"u_a", "coefficients.0.standard_uncertainty"},
                 {"u_b", "coefficients.1.standard_uncertainty"}, {"cov_ab", "coefficient_covariance.0.1"}, {"chi2", "chi_squared"}},
                figures({"--reference", "x", "--indication", "y", "--u-reference", "ux", "--u-indication", "uy", "--function", "line",
                         "--method", "both-uncertain", "--covariance", "stated"}));
    }

    /// Groups that have names are numbered in the order of their names.
    void grouped() {
        const auto group = static_cast<int>(columns_.indexOf(task_["group"].toString()));
        const auto response = static_cast<int>(columns_.indexOf(task_["response"].toString()));
        QStringList names;
        for (const QJsonValue& row : rows_)
            if (!names.contains(row.toArray()[group].toString()))
                names << row.toArray()[group].toString();
        names.sort();
        if (names.size() < 3 && kind_ == "anova1")
            return;
        QByteArray text = "group,y\n";
        for (const QJsonValue& row : rows_)
            text += QByteArray::number(names.indexOf(row.toArray()[group].toString()) + 1) + ',' + row.toArray()[response].toString().toUtf8() + '\n';
        file_ = desk_.file(QStringLiteral("set%1.csv").arg(++tables_), text);
        const QJsonObject got = figures({"--reference", "group", "--indication", "y", "--set-point", "group", "--function", "line"});
        if (kind_ == "anova1") {
            compare("ss_within", at(got, "split.pure_error.ss"));
            compare("ss_between", at(got, "split.regression.ss").toDouble() + at(got, "split.lack_of_fit.ss").toDouble());
            return;
        }
        compare({{"bartlett_K2", "diagnostics.equal_variances.bartlett.statistic"}, {"bartlett_p", "diagnostics.equal_variances.bartlett.p"},
                 {"levene_F", "diagnostics.equal_variances.levene.f"}, {"levene_p", "diagnostics.equal_variances.levene.p"},
                 {"cochran_C", "diagnostics.equal_variances.cochran.c"}}, got);
    }

    void single() {
        if (!write({"y"}, {task_["column"].toString()}))
            return;
        QStringList options{"--indication", "y", "--function", "constant"};
        if (kind_ == "esd")
            options << "--outliers" << task_["max"].toVariant().toString();
        if (kind_ == "esd" || kind_ == "grubbs")
            options << "--outlier-level" << task_["alpha"].toString();
        const QJsonObject got = figures(options);
        compare({{"mean", "coefficients.0.value"}, {"sd", "residual_sd"}, {"sd_of_mean", "coefficients.0.standard_uncertainty"},
                 {"autocorrelation_lag1", "diagnostics.lag1_autocorrelation"}, {"G", "diagnostics.outliers.grubbs.g"},
                 {"G_critical_two_sided", "diagnostics.outliers.grubbs.critical"}, {"outliers", "diagnostics.outliers.esd_count"},
                 {"W", "diagnostics.shapiro_wilk.w"}, {"p", "diagnostics.shapiro_wilk.p"}}, got);
        for (int i = 0; kind_ == "esd" && i < task_["max"].toVariant().toInt(); ++i) {
            compare(QStringLiteral("R[%1]").arg(i + 1), at(got, QStringLiteral("diagnostics.outliers.esd.%1.r").arg(i)));
            compare(QStringLiteral("lambda[%1]").arg(i + 1), at(got, QStringLiteral("diagnostics.outliers.esd.%1.lambda").arg(i)));
        }
    }

    QStringList columns_;
    QJsonArray rows_;
    QJsonObject recomputed_, task_;
    QString kind_, label_, variable_;
    QStringList line_; ///< options of the last fit
    std::string file_, lineFile_;
    int tables_ = 0;
    Desk desk_;
};

} // namespace

/// The whole road, from the decimals as published to the figures printed: sums, coefficients and their uncertainties to 15 digits,
/// interval ends, iterated fits and test statistics to 12, p values to 8. The sources stand in tests/published.
class TestPublishedFigures : public QObject {
    Q_OBJECT

  private slots:
    void figuresAgree_data();
    void figuresAgree();
};

void TestPublishedFigures::figuresAgree_data() {
    QTest::addColumn<QString>("path");
    // Sets about other things than one column, or one polynomial in one variable: other tests hold them.
    static const QStringList others{"durbin_watson_bounds", "ea402_s2_weight", "ea402_s4_gauge_block", "ea402_s9_multimeter", "gum_h1",
                                    "gum_h5", "gum_t_table", "iec60751_pt100", "ilac_g8_guard_bands", "iso5725_critical_values",
                                    "jcgm101_additive", "jcgm101_mass", "jcgm106_conformance", "linewidth_check", "longley",
                                    "mgh10_thermistor", "pressure_sensor_range", "r_longley_diagnostics", "r_stackloss_diagnostics",
                                    "tn1900_surface_temperature", "tolerance_factors"};
    const QDir folder(QString::fromStdString(sourceDir()) + "/tests/published");
    for (const QString& file : folder.entryList({"*.json"}))
        if (const QString name = file.section(QLatin1Char('.'), 0, 0); !others.contains(name))
            QTest::newRow(qPrintable(name)) << folder.filePath(file);
}

void TestPublishedFigures::figuresAgree() {
    QFETCH(QString, path);
    QFile file(path);
    QVERIFY(file.open(QIODevice::ReadOnly));
    const QJsonObject set = QJsonDocument::fromJson(file.readAll()).object();
    PublishedCase published(set);
    for (const QJsonValue& task : set["model"].toObject()["tasks"].toArray())
        published.task(task.toObject());
    QVERIFY2(published.below.isEmpty(), qPrintable(published.below.join(QStringLiteral("; "))));
    QVERIFY(published.compared > 0);
}

QTEST_APPLESS_MAIN(TestPublishedFigures)
#include "tst_published_figures.moc"
