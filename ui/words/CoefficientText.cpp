// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/words/CoefficientText.h"

#include "core/evaluate/FunctionCode.h"
#include "core/exchange/TableWriter.h"
#include "core/fit/CalibrationFunction.h"
#include "core/session/TextMark.h"
#include "ui/words/Words.h"

#include <QCoreApplication>

namespace spanwright {

namespace {

struct CoefficientText {
    Q_DECLARE_TR_FUNCTIONS(CoefficientText)
};

QString tr(const char* text) {
    return CoefficientText::tr(text);
}

QString q(const std::string& text) {
    return QString::fromStdString(text);
}

/// Lines of at most 84 characters, broken between words.
QStringList wrapped(const QStringList& lines) {
    constexpr qsizetype Widest = 84;
    QStringList all;
    for (QString line : lines) {
        while (line.size() > Widest && line.lastIndexOf(QLatin1Char(' '), Widest) > 0) {
            const qsizetype end = line.lastIndexOf(QLatin1Char(' '), Widest);
            all << line.left(end);
            line = line.mid(end + 1);
        }
        all << line;
    }
    return all;
}

/// A quantity with its unit, and a name where it has none.
struct Side {
    QString name, unit;
    [[nodiscard]] QString withUnit() const { return unit.isEmpty() ? name : name + QStringLiteral(" / ") + unit; }
    [[nodiscard]] QString value(const std::string& digits) const { return unit.isEmpty() ? q(digits) : q(digits) + QLatin1Char(' ') + unit; }
};

/// One text, whatever its form: what is said stands here once.
class Writing {
  public:
    Writing(const Record& record, const PrintedFunction& printed)
        : record_(record), printed_(printed), reference_{q(record.item.reference.name), q(record.item.reference.unit)},
          indication_{q(record.item.indication.name), q(record.item.indication.unit)} {
        if (reference_.name.isEmpty() || reference_.name == indication_.name)
            reference_.name = tr("reference");
        if (indication_.name.isEmpty() || indication_.name == q(record.item.reference.name))
            indication_.name = tr("indication");
    }

    [[nodiscard]] QString plain() const {
        QStringList lines = about() << QString() << formula();
        for (const PrintedNumber& number : printed_.numbers)
            lines << QStringLiteral("  ") + q(number.name) + QStringLiteral(" = ") + q(number.text) + (number.unit.empty() ? QString() : QLatin1Char(' ') + q(number.unit));
        lines << QString() << validity() << bound() << QString() << tr("Check values");
        for (const QString& check : checks())
            lines << QStringLiteral("  ") + check;
        lines << QString() << wrapped({caution()});
        return lines.join(QLatin1Char('\n')) + QLatin1Char('\n');
    }

    [[nodiscard]] QString c() const {
        QStringList said = about() << QString() << formula() << validity() << bound() << QString() << tr("Check values");
        for (const QString& check : checks())
            said << QStringLiteral("  ") + check;
        said << QString() << caution();
        QString text = QStringLiteral("/*\n");
        for (QString line : wrapped(said))
            text += (line.isEmpty() ? QStringLiteral(" *") : QStringLiteral(" * ") + line.replace(QStringLiteral("*/"), QStringLiteral("* /"))) + QLatin1Char('\n');
        text += QStringLiteral(" */\n#include <math.h>\n\n");
        const CodeNames names = codeNames(record_.item);
        text += QStringLiteral("/* %1 %2 */\n").arg(ordinate().withUnit(), tr("from %1").arg(abscissa().withUnit())) + q(functionCode(printed_, names));
        const std::string inverse = inverseCode(printed_, names);
        if (!inverse.empty())
            text += QStringLiteral("\n/* %1 %2 */\n").arg(abscissa().withUnit(), tr("from %1").arg(ordinate().withUnit())) + q(inverse);
        return text;
    }

    [[nodiscard]] QString csv() const {
        TableWriter table;
        const auto row = [&](const QString& kind, const std::string& name, const std::string& value, const QString& unit) {
            table.text(kind.toStdString()).text(name).text(value).text(unit.toStdString()).endRow();
        };
        row(tr("kind"), tr("name").toStdString(), tr("value").toStdString(), tr("unit"));
        for (const QString& line : about())
            row(tr("about"), {}, line.toStdString(), {});
        row(tr("function"), functionName(printed_.logger.function()), formula().toStdString(), {});
        for (const PrintedNumber& number : printed_.numbers)
            row(tr("coefficient"), number.name, number.text, q(number.unit));
        if (!printed_.centre.empty())
            row(tr("centre"), {}, printed_.centre, abscissa().unit);
        row(tr("range"), tr("low").toStdString(), printed_.low, abscissa().unit);
        row(tr("range"), tr("high").toStdString(), printed_.high, abscissa().unit);
        csvChecks(row, tr("check %1"), printed_.checks, abscissa(), ordinate());
        csvChecks(row, tr("check back %1"), printed_.inverseChecks, ordinate(), abscissa());
        row(tr("caution"), {}, caution().toStdString(), {});
        return q(table.written());
    }

  private:
    [[nodiscard]] bool forward() const { return printed_.direction == FitDirection::Indication; }
    [[nodiscard]] const Side& abscissa() const { return forward() ? reference_ : indication_; }
    [[nodiscard]] const Side& ordinate() const { return forward() ? indication_ : reference_; }

    /// The item, its certificate, and the readings that the function is of; each text on one line.
    [[nodiscard]] QStringList about() const {
        const Item& item = record_.item;
        QStringList names;
        for (const std::string& text : {item.description, item.maker, item.model})
            if (!text.empty())
                names << q(text).simplified();
        if (!item.serial.empty())
            names << tr("serial %1").arg(q(item.serial).simplified());
        QStringList lines;
        if (!names.isEmpty())
            lines << names.join(QStringLiteral(", "));
        lines << tr("From the readings %1").arg(phaseText(printed_.phase)) +
                     (record_.job.certificateNumber.empty() ? QString() : tr(", certificate draft %1").arg(q(record_.job.certificateNumber).simplified()));
        return lines;
    }

    [[nodiscard]] QString formula() const {
        const FunctionFamily family = printed_.logger.function().family;
        QString text = q(std::string(factsOf(family).formula));
        if (isPolynomial(family))
            text = polynomial();
        else if (family == FunctionFamily::Nernst)
            text = QStringLiteral("E = E0 + slope·(7 − pH)");
        else if (family == FunctionFamily::Table)
            text = tr("linear between these points");
        const bool lettered = family == FunctionFamily::CallendarVanDusen || family == FunctionFamily::ThermistorB ||
                              family == FunctionFamily::SteinhartHart || family == FunctionFamily::Nernst;
        return lettered ? text : text + QStringLiteral(", ") + tr("y is %1, x is %2").arg(ordinate().withUnit(), abscissa().withUnit());
    }

    [[nodiscard]] QString polynomial() const {
        const std::string& centre = printed_.centre;
        const QString x = centre.empty()              ? QStringLiteral("x")
                          : centre.starts_with('-') ? QStringLiteral("(x + %1)").arg(q(centre.substr(1)))
                                                    : QStringLiteral("(x − %1)").arg(q(centre));
        QStringList terms;
        int power = printed_.logger.withoutConstant() ? 1 : 0;
        for (const PrintedNumber& number : printed_.numbers) {
            const QString factor = power == 0 ? QString() : QStringLiteral("·") + x;
            terms << q(number.name) + factor + (power > 1 ? QStringLiteral("^%1").arg(power) : QString());
            ++power;
        }
        return QStringLiteral("y = ") + terms.join(QStringLiteral(" + "));
    }

    [[nodiscard]] QString validity() const {
        return tr("Valid only for %1 from %2 to %3.").arg(abscissa().name, abscissa().value(printed_.low), abscissa().value(printed_.high));
    }
    [[nodiscard]] QString bound() const {
        return printed_.share ? tr("Rounding the numbers costs less than 1/20 of the expanded uncertainty of every value.")
                              : tr("No uncertainty is known, so the numbers stand in full precision.");
    }
    static QString caution() {
        return tr("Taken from a draft: it is not a calibration certificate. Use it as your laboratory's procedures allow, and check it with the check values.");
    }

    [[nodiscard]] QStringList checks() const {
        QStringList lines;
        const auto add = [&](const std::vector<PrintedCheck>& all, const Side& from, const Side& to) {
            for (const PrintedCheck& check : all)
                lines << QStringLiteral("%1 %2  →  %3 %4").arg(from.name, from.value(check.input), to.name, to.value(check.output));
        };
        add(printed_.checks, abscissa(), ordinate());
        add(printed_.inverseChecks, ordinate(), abscissa());
        return lines;
    }

    template <class Row>
    static void csvChecks(const Row& row, const QString& kind, const std::vector<PrintedCheck>& checks, const Side& from, const Side& to) {
        for (std::size_t i = 0; i < checks.size(); ++i) {
            row(kind.arg(i + 1), tr("input").toStdString(), checks[i].input, from.unit);
            row(kind.arg(i + 1), tr("output").toStdString(), checks[i].output, to.unit);
        }
    }

    const Record& record_;
    const PrintedFunction& printed_;
    Side reference_, indication_;
};

QString marked(const QString& text, const MarkFrame& frame) {
    return q(withMark(text.toStdString(), frame));
}

} // namespace

std::optional<CoefficientForm> coefficientForm(const QString& name) {
    if (name == QLatin1String("plain"))
        return CoefficientForm::Plain;
    if (name == QLatin1String("c"))
        return CoefficientForm::C;
    if (name == QLatin1String("csv"))
        return CoefficientForm::Csv;
    return std::nullopt;
}

QString coefficientText(const Record& record, const PrintedFunction& printed, CoefficientForm form) {
    const Writing writing(record, printed);
    switch (form) {
    case CoefficientForm::Plain: return marked(writing.plain(), {{}, {}});
    case CoefficientForm::C: return marked(writing.c() + QLatin1Char('\n'), {"/* ", " */"});
    case CoefficientForm::Csv: return marked(writing.csv(), {"about,,", ","});
    }
    return {};
}

} // namespace spanwright
