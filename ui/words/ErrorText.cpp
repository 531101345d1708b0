// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/record/Fields.h"
#include "ui/words/Sentence.h"
#include "ui/words/Words.h"

#include <QCoreApplication>

namespace spanwright {

namespace {

/// The sentences. Where it happened stands before them, so each says what is wrong and what to do. The switch has no default, so
/// that a new code without a sentence does not compile.
struct ErrorText {
    Q_DECLARE_TR_FUNCTIONS(ErrorText)

  public:
    static QString of(ErrorCode code, Sentence& facts);
    static QString methodUnfit(Sentence& facts);
    static QString numbersOf(Sentence& facts);
};

QString ErrorText::numbersOf(Sentence& facts) {
    const QString quantity = facts.plain("quantity");
    if (quantity == QLatin1String("reference"))
        return tr("the reference values");
    if (quantity == QLatin1String("indication"))
        return tr("the indications");
    return quantity == QLatin1String("uncertainty") ? tr("the stated uncertainties") : tr("the numbers");
}

QString ErrorText::methodUnfit(Sentence& facts) {
    const QString reason = facts.plain("reason"), function = facts.quoted("text", tr("this function"));
    if (reason == QLatin1String("function"))
        return tr("with both quantities uncertain, a line or a line through zero can be fitted, not %1. Choose one of these, or weights from "
                  "the stated uncertainties.")
            .arg(function);
    if (reason == QLatin1String("non-linear"))
        return tr("covariances between readings are taken in for functions that are linear in their coefficients, not for %1. Choose "
                  "another function, or remove the matrix.")
            .arg(function);
    if (reason == QLatin1String("knots"))
        return tr("a table takes at most %1 set points; there are %2. State the set points of the readings, or choose another function.")
            .arg(facts.plain("most", tr("some")), facts.plain("got", tr("more")));
    if (reason == QLatin1String("robust"))
        return tr("a robust fit does not use covariances between readings. Choose least squares, or remove the matrix.");
    if (reason == QLatin1String("abscissa"))
        return tr("this function takes its abscissa as exact, so the calibration error of the standard has no place in it. Choose “both "
                  "uncertain”, or carry the error to the budget.");
    if (reason == QLatin1String("scaled"))
        return tr("a stated calibration error cannot be scaled by the residuals. Take the stated uncertainties as they are, or carry the "
                  "error to the budget.");
    return tr("this way of fitting is not possible here. Choose another method.");
}

QString ErrorText::of(ErrorCode code, Sentence& facts) {
    switch (code) {
    // files
    case ErrorCode::FileMissing: return tr("there is no such file. Check the name and the folder.");
    case ErrorCode::FileEmpty: return tr("the file is empty. Choose the file that holds the readings.");
    case ErrorCode::FileIsDirectory: return tr("this is a folder. Choose a file in it.");
    case ErrorCode::FileNotReadable: return tr("the file may not be read. Ask for permission, or copy it to a folder of your own.");
    case ErrorCode::FileNotWritable: return tr("the file may not be written. Save under another name or in another folder.");
    case ErrorCode::FileReadFailed: return tr("reading the file broke off. Check the drive or the connection and try again.");
    case ErrorCode::FileWriteFailed:
        return tr("writing the file broke off; what stood there before is unchanged. Check the free space, or save elsewhere.");
    case ErrorCode::FileChangedOnDisk:
        return tr("the file was changed by another program since it was opened. Save under another name, or open it again.");
    case ErrorCode::FileInUse:
        return tr("the file is open elsewhere, by %1. Close it there, or save under another name.")
            .arg(facts.plain("holder", facts.plain("by", tr("another program"))));
    case ErrorCode::FileExists:
        return tr("there is such a file already, and it was left as it is. Give another name, or add --replace to write over it.");
    case ErrorCode::FileIsInput: return tr("this file is read here and would be written over. Give another name for the result.");
    case ErrorCode::FileIsSession:
        return tr("this file is a session, and a result is never written over one. Give another name for the result.");
    case ErrorCode::FileBinary: return tr("this is not text. Export the readings as CSV and open that file.");
    case ErrorCode::FileEncoding:
        return tr("the bytes are not valid in the encoding %1. State the encoding in which the file was written.")
            .arg(facts.plain("encoding", tr("assumed")));
    // tables of text
    case ErrorCode::UnclosedQuote: return tr("a quotation mark is opened and never closed. Close it in the file.");
    case ErrorCode::RaggedRow:
        return tr("the line has more or fewer cells than the others%1. Complete it, or check the separator.")
            .arg(!facts.has("text") ? QString() : facts.plain("text").isEmpty() ? tr(": it ends early") : tr(" (%1)").arg(facts.quoted("text", {})));
    case ErrorCode::HeaderShort:
        return tr("the header names %1 of %2 columns, so it is not certain to which of them a name belongs. Complete the header, remove it, or "
                  "check the separator.")
            .arg(facts.plain("got", tr("only some")), facts.plain("needed", tr("the")));
    case ErrorCode::NotANumber:
        return tr("%1 is not a number. Correct the cell, or leave its row out by stating it as excluded.")
            .arg(facts.quoted("text", tr("the cell")));
    case ErrorCode::NumberTooLarge:
        return tr("%1 is beyond the numbers that can be held. Check the exponent.").arg(facts.quoted("text", tr("the number")));
    case ErrorCode::ThousandsSeparator:
        return tr("%1 seems to hold a thousands separator, or the other decimal mark. Write the number without it, or state the "
                  "decimal mark.")
            .arg(facts.quoted("text", tr("the number")));
    case ErrorCode::ColumnMissing:
        return facts.has("quantity") ? tr("no column is left for the %1. Check the separator, or name the columns.").arg(facts.plain("quantity"))
                                     : tr("there is no column %1. Name a column of the header, or its number from 1.")
                                           .arg(facts.quoted("name", facts.quoted("column", tr("of that name"))));
    case ErrorCode::ColumnUnclear:
        if (facts.has("named"))
            return tr("several columns are named %1: %2. Name the one that is meant by its number.").arg(facts.quoted("named", {}), facts.plain("columns", tr("more than one")));
        if (facts.has("reference"))
            return tr("the column %1 is named like the reference, and no other holds the %2%3. Name the column of the %2 with --%2.")
                .arg(facts.quoted("reference", {}), facts.plain("quantity"), facts.has("name") ? tr(", %1").arg(facts.quoted("name", {})) : QString());
        return tr("it is not certain which column holds the %1: %2 could be meant, and none is named %3. Name the column with --%1.")
            .arg(facts.plain("quantity", QStringLiteral("indication")), facts.plain("columns", tr("several")), facts.quoted("name", tr("so")));
    case ErrorCode::NoDataRows: return tr("there is no row of readings under the header. Choose the file that holds the readings.");
    case ErrorCode::SeparatorUnclear: return tr("the separator of the columns is not certain; %1 was taken. State it where the guess is wrong.")
            .arg(facts.quoted("separator", tr("one")));
    case ErrorCode::DecimalMarkUnclear: return tr("the decimal mark is not certain: in %1 both point and comma would do. State it where the guess is wrong.")
            .arg(facts.quoted("text", tr("the numbers")));
    case ErrorCode::DateOrderUnclear:
        return tr("the order of day and month is not certain from %1. State it where the guess is wrong.")
            .arg(facts.quoted("text", tr("the dates")));
    case ErrorCode::DirectionUnknown:
        return tr("%1 is no direction. Write up or down, rising or falling.").arg(facts.quoted("text", tr("the cell")));
    case ErrorCode::UnitsDiffer:
        return tr("the column %1 is in %2, the calibration in %3. Convert the column, or correct its unit in the header.")
            .arg(facts.quoted("name", tr("chosen")), facts.plain("unit", tr("one unit")), facts.plain("expected", tr("another")));
    // session files
    case ErrorCode::NotJson:
        return tr("this is no session: the text is broken or cut off. Open the backup or the recovery file beside it.");
    case ErrorCode::NotASession: return tr("this file was not written as a session. Open a session, or import readings as CSV.");
    case ErrorCode::NewerLayout:
        return tr("the session was written by a newer program (layout version %1). It can be looked at, not changed; use the newer "
                  "program.")
            .arg(facts.plain("version", tr("unknown")));
    case ErrorCode::SessionValueBad:
        return tr("the value %1 cannot be read. Correct it in the file, or open the backup.")
            .arg(facts.quoted("key", facts.quoted("text", tr("there"))));
    // typing
    case ErrorCode::CellEmpty: return tr("there is nothing in the cell. Type a number.");
    case ErrorCode::CellNotANumber:
        return facts.has("line")
                   ? tr("%1 is no number. Correct it in the file, or name it as a word that stands for no value.")
                         .arg(facts.quoted("text", tr("the cell")))
                   : tr("%1 is not a number. Type digits, such as 12.04.").arg(facts.quoted("text", tr("this")));
    case ErrorCode::CellDateBad:
        return tr("%1 is not a date. Type year, month and day, such as 2026-11-30.").arg(facts.quoted("text", tr("this")));
    case ErrorCode::CellOutOfRange:
        if (facts.plain("reason") == QLatin1String("no-range"))
            return tr("%1 is a share of the range, and no range is stated. State the range of the item first.").arg(facts.quoted("text", tr("this")));
        return tr("%1 is outside what is possible here. Check the digits and the unit.").arg(facts.quoted("text", tr("the value")));
    case ErrorCode::ReasonMissing: return tr("a reason is needed. Choose one from the list, or write it in words.");
    // the record as a whole
    case ErrorCode::NoReadings:
        if (const auto phase = valueOf<Phase>(facts.plain("phase").toStdString()))
            return tr("there are no readings %1. Leave --phase out, or state the phase of the readings in a session.").arg(phaseText(*phase));
        return tr("there are no readings. Enter readings, or take in a file.");
    case ErrorCode::ReadingMissing:
        return tr("there is no reading %1; the last one is %2. Readings are counted from 1, without the header of a table.")
            .arg(facts.plain("reading", tr("of that number")), facts.plain("last", tr("before it")));
    case ErrorCode::TooFewReadings:
        return tr("readings: %1, too few for this function, which needs %2. Take more readings, or choose a simpler function.")
            .arg(facts.plain("got", tr("not enough")), facts.plain("needed", tr("more")));
    case ErrorCode::ReferencesAllEqual:
        return tr("all values are equal%1, so no slope can be found. Take readings at other set points, or choose the function “constant”.")
            .arg(facts.has("value") ? tr(" to %1").arg(facts.plain("value")) : QString());
    case ErrorCode::TooFewSetPoints:
        return tr("set points: %1, too few for this function, which needs %2. Take more set points, or choose a simpler function.")
            .arg(facts.plain("got", tr("not enough")), facts.plain("needed", tr("more")));
    case ErrorCode::RankLost:
        return tr("the readings cannot tell these coefficients apart: %1. Choose a simpler function, or spread the set points.")
            .arg(facts.plain("terms", tr("some of them")));
    case ErrorCode::OutsideDomain:
        facts.plain("function");
        return tr("values in row %1 lie outside those for which this function exists%2. Exclude them with a reason, or choose another "
                  "function.")
            .arg(facts.plain("rows", tr("one of the table")), facts.has("where") ? QStringLiteral(" (") + facts.plain("where") + QLatin1Char(')') : QString());
    case ErrorCode::UncertaintyNotPositive:
        return tr("a stated uncertainty in row %1 is zero or negative. Correct it; a standard uncertainty is above zero.")
            .arg(facts.plain("rows", tr("one of the table")));
    case ErrorCode::UncertaintyMissing:
        return tr("this way of weighing needs a standard uncertainty for every reading; row %1 has none. State it, or choose equal "
                  "weights and the residual spread.")
            .arg(facts.plain("rows", tr("one of the table")));
    case ErrorCode::NoSpread:
        return tr("weights from replicates need readings that differ at each set point; those in row %1 stand alone or do not differ. Read "
                  "each set point again, or choose weights by level or equal weights.")
            .arg(facts.plain("rows", tr("one of the table")));
    case ErrorCode::TooFewReplicates:
        return tr("weights by level need %1 set points that were read more than once; there are %2. Read them again, or choose equal weights.")
            .arg(facts.plain("needed", tr("two")), facts.plain("got", tr("fewer")));
    case ErrorCode::LevelZero:
        return tr("weights proportional to level have no value at level zero, in row %1. Exclude it with a reason, or choose weights that "
                  "grow with level from a constant.")
            .arg(facts.plain("rows", tr("one of the table")));
    case ErrorCode::MagnitudeUnfit:
        return facts.plain("side") == QLatin1String("small")
                   ? tr("%1 in row %2 are below %3 in magnitude, so small that their squares vanish. State them in a smaller unit.")
                         .arg(numbersOf(facts), facts.plain("rows", tr("one of the table")), facts.plain("limit", tr("what can be squared")))
                   : tr("%1 in row %2 are above %3 in magnitude, so large that their squares cannot be held. State them in a larger unit.")
                         .arg(numbersOf(facts), facts.plain("rows", tr("one of the table")), facts.plain("limit", tr("what can be squared")));
    case ErrorCode::NoConvergence:
        return tr("the fit did not settle: %1. Choose another function, or check the readings for slips.")
            .arg(facts.plain("reason", tr("the steps did not grow smaller")));
    case ErrorCode::NoInverse:
        return tr("the function has no single reference value for an indication. Narrow the range, or choose a function that only "
                  "rises or falls.");
    case ErrorCode::FunctionUnknown:
        return tr("%1 is no calibration function known here. Write, for example, line or polynomial:2.")
            .arg(facts.quoted("text", tr("this")));
    case ErrorCode::ColumnUnfit:
        if (facts.has("twice"))
            return tr("the column %1 is taken as reference and as indication. Name another column for one of them.").arg(facts.quoted("twice", {}));
        return tr("the column %1 cannot be used for this.").arg(facts.quoted("name", tr("chosen")));
    case ErrorCode::MethodUnfit: return methodUnfit(facts);
    case ErrorCode::CovarianceTooLarge:
        return tr("the covariance in row %1 is larger than the product of both stated uncertainties. Correct the covariance or the "
                  "uncertainties.")
            .arg(facts.plain("rows", tr("one of the table")));
    case ErrorCode::MatrixShape:
        return tr("a covariance matrix is square, and row %1 has %2 numbers where there are %3 rows. Complete the row, or check the "
                  "separator.")
            .arg(facts.plain("row", tr("one")), facts.plain("got", tr("other")), facts.plain("needed", tr("other")));
    case ErrorCode::MatrixSize:
        return tr("the matrix has %1 rows, and there are %2 readings. Give %2 rows for the indications alone, or %3 for all references "
                  "followed by all indications.")
            .arg(facts.plain("got", tr("other")), facts.plain("readings", tr("other")), facts.plain("both", tr("twice as many")));
    case ErrorCode::MatrixTooLarge:
        return tr("covariances between readings are taken in for at most %1 readings; there are %2. State them for fewer readings, such as "
                  "the means of the set points.")
            .arg(facts.plain("most", tr("some")), facts.plain("got", tr("more")));
    case ErrorCode::MatrixNotSymmetric:
        return tr("the matrix is not symmetric: row %1, column %2 has %3, and row %2, column %1 has %4. Correct one of them.")
            .arg(facts.plain("row"), facts.plain("column"), facts.plain("text"), facts.plain("mirror"));
    case ErrorCode::MatrixNotPositive:
        return tr("the matrix is not positive definite: row %1 is determined by the rows before it, or contradicts them. Check its "
                  "variance and its covariances; none may exceed the product of the two standard uncertainties.")
            .arg(facts.plain("row", tr("one")));
    case ErrorCode::MatrixRowMissing:
        return tr("the covariance matrix has no row for reading %1. Load a matrix with all readings, exclude the reading, or remove the "
                  "matrix.")
            .arg(facts.plain("rows", tr("one of the table")));
    case ErrorCode::Cancelled: return tr("the computation was stopped before its end. Nothing was changed.");
    case ErrorCode::CertificateIncomplete:
        return tr("the certificate is not complete: %1. Enter it, or print the draft as incomplete.")
            .arg(facts.plain("missing", tr("entries are missing")));
    // the command line
    case ErrorCode::UsageUnknownOption:
        return tr("there is no option %1. See spanwright --help.").arg(facts.quoted("option", facts.quoted("text", tr("of that name"))));
    case ErrorCode::UsageValueBad:
        return tr("the option %1 does not take %2. See spanwright --help.")
            .arg(facts.plain("option"), facts.quoted("text", tr("this value")));
    case ErrorCode::UsageValueMissing: return tr("the option %1 needs a value. See spanwright --help.").arg(facts.plain("option"));
    case ErrorCode::UsageNoFile:
        return tr("a file is needed: spanwright %1 FILE. See spanwright --help.").arg(facts.plain("command"));
    case ErrorCode::UsageUnknownCommand:
        if (facts.has("command"))
            return tr("%1 takes one file, and %2 is one more. See spanwright --help.").arg(facts.quoted("command", {}), facts.quoted("text", tr("another")));
        return tr("there is no command or file %1. See spanwright --help.").arg(facts.quoted("text", tr("of that name")));
    }
    return {};
}

} // namespace

QString errorText(const Error& error) {
    Sentence facts(error.facts);
    const QString place = error.code == ErrorCode::ColumnMissing ? facts.file() : facts.place();
    QString sentence = ErrorText::of(error.code, facts);
    if (place.isEmpty() && !sentence.isEmpty())
        sentence[0] = sentence[0].toUpper();
    return place + sentence + facts.rest();
}

} // namespace spanwright
