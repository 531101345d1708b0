// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/budget/makeBudget.h"
#include "core/evaluate/evaluate.h"
#include "core/exchange/MatrixTable.h"
#include "core/fit/StatedCovariance.h"
#include "tests/support/FitHelp.h"

#include <QTest>

#include <boost/multiprecision/cpp_bin_float.hpp>

#include <cmath>

using namespace spanwright;
using namespace spanwright::test;

namespace {

/// 113 bits, for an independent route.
using Quad = boost::multiprecision::cpp_bin_float_quad;

/// ISO/TS 28037:2010, clause 9, example: data as in the software that supports the standard (National Physical Laboratory, 2024).
TypedReadings clause9() {
    return {{"1.0", "2.0", "3.0", "4.0", "5.0", "6.0", "7.0", "8.0", "9.0", "10.0"},
            {"1.3", "4.1", "6.9", "7.5", "10.2", "12.0", "14.5", "17.1", "19.5", "21.0"},
            {},
            {},
            {}};
}
constexpr const char* Clause9Matrix = "2 1 1 1 1 0 0 0 0 0\n1 2 1 1 1 0 0 0 0 0\n1 1 2 1 1 0 0 0 0 0\n1 1 1 2 1 0 0 0 0 0\n"
                                      "1 1 1 1 2 0 0 0 0 0\n0 0 0 0 0 5 4 4 4 4\n0 0 0 0 0 4 5 4 4 4\n0 0 0 0 0 4 4 5 4 4\n"
                                      "0 0 0 0 0 4 4 4 5 4\n0 0 0 0 0 4 4 4 4 5\n";

/// Clause 10, example, from the same source; the covariances between references and indications are zero.
TypedReadings clause10() {
    return {{"50.4", "99.0", "149.9", "200.4", "248.5", "299.7", "349.1"},
            {"52.3", "97.8", "149.7", "200.1", "250.4", "300.9", "349.2"},
            {},
            {},
            {}};
}
constexpr const char* Clause10References[] = {"0.5 0 0.25 0 0.25 0 0.25",     "0 1.25 1 0 0 1 1",     "0.25 1 1.5 0 0.25 1 1.25",
                                              "0 0 0 1.25 1 1 1",             "0.25 0 0.25 1 1.5 1 1.25", "0 1 1 1 1 2.25 2",
                                              "0.25 1 1.25 1 1.25 2 2.5"};

std::string clause10Matrix() {
    std::string text;
    for (const char* row : Clause10References)
        text += std::string(row) + " 0 0 0 0 0 0 0\n";
    for (int i = 0; i < 7; ++i) {
        text += "0 0 0 0 0 0 0";
        for (int j = 0; j < 7; ++j)
            text += i == j ? " 5" : " 1";
        text += '\n';
    }
    return text;
}

/// Clause 8: the data of clause 7.4 with u(x_i, y_i) = 0.036, as in the same software; the standard prints no example.
TypedReadings clause8() {
    return {{"1.2", "1.9", "2.9", "4.0", "4.7", "5.9"},
            {"3.4", "4.4", "7.2", "8.5", "10.8", "13.5"},
            {"0.2", "0.2", "0.2", "0.2", "0.2", "0.2"},
            {"0.2", "0.2", "0.2", "0.4", "0.4", "0.4"},
            {"0.036", "0.036", "0.036", "0.036", "0.036", "0.036"}};
}

Result<UncertaintyMatrix> matrixOf(const Record& record, const std::string& text) {
    const auto numbers = readMatrix(text);
    return numbers ? uncertaintyMatrix(*numbers, record, Phase::AsFound, "test") : numbers.error();
}

Record stated(const TypedReadings& readings, Method method, const std::string& matrix = {}) {
    Record record = recordOf(readings);
    record.choices.method = method;
    record.choices.weights = Weights::Stated;
    record.choices.covariance = CovarianceScale::Stated;
    if (!matrix.empty())
        record.uncertaintyMatrix = *matrixOf(record, matrix);
    return record;
}

/// A diagonal matrix from standard uncertainties as typed.
std::string diagonal(const std::vector<std::string>& variances) {
    std::string text;
    for (std::size_t i = 0; i < variances.size(); ++i) {
        for (std::size_t j = 0; j < variances.size(); ++j)
            text += (j == 0 ? "" : "\t") + (i == j ? variances[i] : std::string("0"));
        text += '\n';
    }
    return text;
}

/// R 4.2.2: a, b, u(a), u(b), cov(a, b), χ². For clause 9
///   gls <- function(x, y, U) { L <- t(chol(U)); A <- forwardsolve(L, cbind(1, x)); z <- forwardsolve(L, y); q <- qr(A)
///     b <- qr.coef(q, z); C <- chol2inv(qr.R(q)); r <- z - A %*% b; c(b, sqrt(diag(C)), C[1, 2], sum(r^2)) }
/// and for clauses 8 and 10 the Gauss–Newton iteration of the standard with all 2m equations
///   ggmr <- function(x, y, U) { m <- length(x); L <- t(chol(U)); f0 <- gls(x, y, diag(diag(U)[(m+1):(2*m)])); a <- f0[1]; b <- f0[2]; X <- x
///     for (k in 1:200) { f <- c(x - X, y - a - b*X); J <- rbind(cbind(-diag(m), 0, 0), cbind(-b*diag(m), -1, -X))
///       ft <- forwardsolve(L, f); Jt <- forwardsolve(L, J); d <- -qr.solve(Jt, ft)
///       X <- X + d[1:m]; a <- a + d[m+1]; b <- b + d[m+2]; if (max(abs(d)) < 1e-14) break }
///     C <- solve(t(Jt) %*% Jt)[(m+1):(m+2), (m+1):(m+2)]; ft <- forwardsolve(L, c(x - X, y - a - b*X))
///     c(a, b, sqrt(diag(C)), C[1, 2], sum(ft^2)) }
struct Computed {
    double a, b, ua, ub, cov, chi;
};
constexpr Computed clause9InR{-0.64556390977443967, 2.20135338345864717, 1.27261497405163815, 0.20149814827784032, -0.16691729323308285, 2.07395488721804533};
constexpr Computed clause10InR{0.3424008274451001976, 1.0012307628224461631, 2.0569220501160065950, 0.0090116309806253739, -0.0128831982429189074, 1.7718474509100576864};
constexpr Computed clause8InR{0.581591867669060680, 2.169995466594958788, 0.285644798121405807, 0.090191286306790755, -0.022837312350190406, 6.482691314400689464};

bool close(double got, double expected, double relative) {
    return std::fabs(got / expected - 1) < relative;
}

bool agrees(const Fit& fit, const Computed& r, double digits) {
    return close(fit.coefficients[0].value, r.a, digits) && close(fit.coefficients[1].value, r.b, digits) &&
           close(fit.coefficients[0].standardUncertainty, r.ua, digits) &&
           close(fit.coefficients[1].standardUncertainty, r.ub, digits) && close(fit.covariance[1], r.cov, digits) &&
           close(*fit.chiSquared, r.chi, digits);
}

bool sameLine(const Fit& one, const Fit& other, double digits) {
    return agrees(one, {other.coefficients[0].value, other.coefficients[1].value, other.coefficients[0].standardUncertainty,
                        other.coefficients[1].standardUncertainty, other.covariance[1], *other.chiSquared},
                  digits);
}

/// zᵀV⁻¹z at a + bx in 113 bits, by elimination: an independent route to χ², least at the solution.
Quad chiSquaredAt(const JointCovariance& u, const TypedReadings& readings, const Quad& a, const Quad& b) {
    const std::size_t n = readings.indication.size();
    std::vector<std::vector<Quad>> v(n, std::vector<Quad>(n + 1));
    const auto quad = [](const DoubleDouble& d) { return Quad(d.x[0]) + Quad(d.x[1]); };
    for (std::size_t i = 0; i < n; ++i) {
        for (std::size_t j = 0; j < n; ++j)
            v[i][j] = quad(u.yy[i * n + j]) - b * (quad(u.xy[i * n + j]) + quad(u.xy[j * n + i])) + b * b * quad(u.xx[i * n + j]);
        v[i][n] = Quad(readings.indication[i]) - a - b * Quad(readings.reference[i]);
    }
    Quad sum = 0;
    for (std::size_t k = 0; k < n; ++k) {
        sum += v[k][n] * v[k][n] / v[k][k];
        for (std::size_t i = k + 1; i < n; ++i) {
            const Quad factor = v[i][k] / v[k][k];
            for (std::size_t j = k; j <= n; ++j)
                v[i][j] -= factor * v[k][j];
        }
    }
    return sum;
}

Standard standardWith(const char* id, const char* expanded, UncertaintyForm form = UncertaintyForm::Absolute) {
    Standard standard;
    standard.id = id;
    standard.expandedUncertainty = *Decimal::parse(expanded);
    standard.coverageFactor = *Decimal::parse("2");
    standard.form = form;
    return standard;
}

} // namespace

class CorrelatedFit : public QObject {
    Q_OBJECT

  private slots:
    /// The figures of the standard's example, from memory, are those of R above rounded.
    void covariancesOfIndicationsAsInTheSpecification() {
        Record record = stated(clause9(), Method::LeastSquares, Clause9Matrix);
        const Fit fit = fitted(record, "line").fit;
        QVERIFY(fit.correlated);
        QVERIFY(agrees(fit, clause9InR, 1e-13));
        QCOMPARE(fit.degreesOfFreedom, 8);
        QVERIFY(std::fabs(*fit.chiSquaredP - 0.978660303) < 5e-10); // R: pchisq(2.07395488721804533, 8, lower.tail = FALSE)
    }

    void covariancesOfBothAsInTheSpecification() {
        Record record = stated(clause10(), Method::BothUncertain, clause10Matrix());
        const Fit fit = fitted(record, "line").fit;
        QVERIFY(agrees(fit, clause10InR, 1e-11));
        QVERIFY(fit.convergence.reached);
        QCOMPARE(QString::fromStdString(fit.convergence.reason), QString("gradient"));
    }

    void covarianceOfAReading() {
        Record record = stated(clause8(), Method::BothUncertain);
        const Fit fit = fitted(record, "line").fit;
        QVERIFY(!fit.correlated);
        QVERIFY(agrees(fit, clause8InR, 1e-11));
    }

    /// χ² of clause 10 as computed, and no neighbour has less.
    void chiSquaredIsLeast() {
        Record record = stated(clause10(), Method::BothUncertain, clause10Matrix());
        const Fit fit = fitted(record, "line").fit;
        const Sample sample = makeSample(record, Phase::AsFound);
        const FitTask task{sample, record.choices, FitDirection::Indication, sample.reference, sample.indication,
                           sample.uReference, sample.uIndication, nullptr, {}, 0, 0};
        const auto joint = jointCovariance(task, CovarianceOf::Both);
        QVERIFY(joint.ok());
        const Quad a = fit.coefficients[0].value, b = fit.coefficients[1].value;
        const Quad least = chiSquaredAt(*joint, clause10(), a, b);
        QVERIFY(close(static_cast<double>(least), *fit.chiSquared, 1e-14));
        for (const auto& [da, db] : {std::pair(1e-6, 0.0), std::pair(-1e-6, 0.0), std::pair(0.0, 1e-8), std::pair(0.0, -1e-8)})
            QVERIFY(chiSquaredAt(*joint, clause10(), a + da, b + db) > least);
    }

    /// Clause 8 without covariance, and clause 10 with a diagonal, are clause 7; clause 9 with a diagonal is clause 6.
    void reducesToTheSimplerClauses() {
        TypedReadings readings = clause8();
        readings.uCovariance.clear();
        Record columns = stated(readings, Method::BothUncertain);
        const Fit seven = fitted(columns, "line").fit;
        readings.uCovariance.assign(6, "0.000");
        Record zero = stated(readings, Method::BothUncertain);
        QVERIFY(sameLine(fitted(zero, "line").fit, seven, 1e-15));
        const std::vector<std::string> variances{"0.04", "0.04", "0.04", "0.04", "0.04", "0.04",
                                                 "0.04", "0.04", "0.04", "0.16", "0.16", "0.16"};
        Record full = stated({readings.reference, readings.indication, {}, {}, {}}, Method::BothUncertain, diagonal(variances));
        QVERIFY(sameLine(fitted(full, "line").fit, seven, 1e-14));
        columns.choices.method = Method::LeastSquares;
        const Fit six = fitted(columns, "line").fit;
        Record indications = stated({readings.reference, readings.indication, {}, {}, {}}, Method::LeastSquares,
                                    diagonal({variances.begin() + 6, variances.end()}));
        QVERIFY(sameLine(fitted(indications, "line").fit, six, 1e-14));
        QVERIFY(close(fitted(indications, "line").fit.totalSs, six.totalSs, 1e-14));
        // The covariances of clause 8 inside a full matrix of clause 10.
        Record eight = stated(clause8(), Method::BothUncertain);
        std::string text;
        for (int i = 0; i < 12; ++i) {
            for (int j = 0; j < 12; ++j)
                text += (i == j ? variances[static_cast<std::size_t>(i)] : std::abs(i - j) == 6 ? "0.036" : "0") + " ";
            text += '\n';
        }
        Record inFull = stated({readings.reference, readings.indication, {}, {}, {}}, Method::BothUncertain, text);
        QVERIFY(sameLine(fitted(inFull, "line").fit, fitted(eight, "line").fit, 1e-14));
    }

    /// The line does not depend on which quantity is called x, nor on the order of the readings.
    void symmetricAndFreeOfOrder() {
        Record record = stated(clause10(), Method::BothUncertain, clause10Matrix());
        const Fit fit = fitted(record, "line").fit;
        record.choices.fit = FitDirection::Reference;
        const Fit inverse = fitted(record, "line").fit;
        QVERIFY(close(fit.coefficients[1].value * inverse.coefficients[1].value, 1, 1e-14));
        QVERIFY(close(*fit.chiSquared, *inverse.chiSquared, 1e-13));
        Record proportional = stated(clause10(), Method::BothUncertain, clause10Matrix());
        const Fit ray = fitted(proportional, "proportional").fit;
        proportional.choices.fit = FitDirection::Reference;
        QVERIFY(close(ray.coefficients[0].value * fitted(proportional, "proportional").fit.coefficients[0].value, 1, 1e-14));
    }

    /// Rows stay with their readings: leaving one out drops its rows, one that comes later has none.
    void rowsStayWithTheirReadings() {
        Record record = stated(clause9(), Method::LeastSquares, Clause9Matrix);
        record.exclusions.edit().add({record.readings->ids()[2], ExclusionReason::Disturbance, {}, {}, 0});
        const Fit without = fitted(record, "line").fit;
        Record removed = stated(clause9(), Method::LeastSquares, Clause9Matrix);
        removed.readings.edit().remove(removed.readings->ids()[2]);
        QVERIFY(sameLine(fitted(removed, "line").fit, without, 1e-16));
        // R: the same with the third reading and its row and column left out.
        QVERIFY(close(without.coefficients[1].value, 2.20981343283582055, 1e-13));
        Reading later;
        later.id = 100;
        later.reference = *Decimal::parse("11");
        later.indication = *Decimal::parse("23");
        record.readings.edit().append(later);
        const Error error = refused(record, "line");
        QCOMPARE(error.code, ErrorCode::MatrixRowMissing);
        QCOMPARE(QString::fromStdString(std::string(error.fact("rows"))), QString("11"));
    }

    /// An absolute error that all references share moves no estimate of a line; it adds b²u² to u²(a) and nothing to the slope.
    void sharedErrorOfAStandard() {
        TypedReadings readings = clause8();
        readings.uCovariance.clear();
        Record record = stated(readings, Method::BothUncertain);
        const Fit apart = fitted(record, "line").fit;
        record.standards = {standardWith("P", "0.10")};
        QVERIFY(sameLine(fitted(record, "line").fit, apart, 1e-16)); // carried to the budget
        record.choices.sharedError = SharedError::Fit;
        const Fit shared = fitted(record, "line").fit;
        QVERIFY(shared.correlated);
        QVERIFY(close(shared.coefficients[0].value, apart.coefficients[0].value, 1e-13));
        QVERIFY(close(shared.coefficients[1].standardUncertainty, apart.coefficients[1].standardUncertainty, 1e-13));
        const double b = apart.coefficients[1].value;
        QVERIFY(close(shared.covariance[0], apart.covariance[0] + b * b * 0.05 * 0.05, 1e-13));
        QVERIFY(close(*shared.chiSquared, *apart.chiSquared, 1e-12));
    }

    /// Counted once: a value read back has the same U whether the standard's error is a line of the budget or a covariance of the
    /// fit, because an absolute error shared by all references is the same at every value.
    void sharedErrorIsCountedOnce() {
        Record record = stated(clause8(), Method::BothUncertain);
        record.standards = {standardWith("P", "0.10")};
        Progress progress;
        const auto budgeted = evaluate(record, progress);
        record.choices.sharedError = SharedError::Fit;
        const auto fittedIn = evaluate(record, progress);
        const PhaseEvaluation& one = *budgeted->phase(Phase::AsFound);
        const PhaseEvaluation& other = *fittedIn->phase(Phase::AsFound);
        const auto standards = [](const SetPointBudget& budget) {
            return std::count_if(budget.items.begin(), budget.items.end(),
                                 [](const BudgetItem& item) { return item.derived == DerivedLine::StandardUncertainty; });
        };
        QCOMPARE(standards(*one.budget.readBack), 1);
        QCOMPARE(standards(*other.budget.readBack), 0);
        QCOMPARE(standards(other.budget.points.front()), 1); // the error at a set point takes nothing from the fit
        QVERIFY(close(other.budget.readBack->expandedReference, one.budget.readBack->expandedReference, 1e-12));
        QVERIFY(!other.split && !other.diagnostics);
        QVERIFY(std::any_of(other.warnings.begin(), other.warnings.end(), [](const Warning& w) { return w.code == WarningCode::FigureUndefined; }));
    }

    /// A polynomial through correlated indications; and an evaluation function whose ordinates share the standard's error.
    void otherLinearFunctions() {
        Record record = stated(clause9(), Method::LeastSquares, Clause9Matrix);
        const Fit curve = fitted(record, "polynomial:2").fit;
        // R: gls() above with cbind(1, x, x^2)
        QVERIFY(close(curve.coefficients[2].value, 0.0083333333333333419, 1e-12));
        QCOMPARE(refused(record, "power").code, ErrorCode::MethodUnfit);
        TypedReadings readings = clause8();
        readings.uCovariance.clear();
        Record reference = stated(readings, Method::LeastSquares);
        reference.choices.fit = FitDirection::Reference;
        reference.standards = {standardWith("P", "0.10")};
        const Fit apart = fitted(reference, "line").fit;
        reference.choices.sharedError = SharedError::Fit;
        const Fit shared = fitted(reference, "line").fit;
        QVERIFY(close(shared.covariance[0], apart.covariance[0] + 0.05 * 0.05, 1e-13));
    }

    void refuses() {
        Record record = recordOf(clause9());
        const auto code = [&](const std::string& text) { return matrixOf(record, text).error(); };
        std::string text = Clause9Matrix;
        text.replace(0, 3, "2 3");
        const Error asymmetric = code(text);
        QCOMPARE(asymmetric.code, ErrorCode::MatrixNotSymmetric);
        QCOMPARE(std::string(asymmetric.fact("row")) + "/" + std::string(asymmetric.fact("column")), std::string("2/1"));
        text.replace(20, 3, "3 2");
        const Error notPositive = code(text);
        QCOMPARE(notPositive.code, ErrorCode::MatrixNotPositive);
        QCOMPARE(std::string(notPositive.fact("row")), std::string("2"));
        QCOMPARE(code("1 0\n0 1\n").code, ErrorCode::MatrixSize);
        QCOMPARE(code("1 0\n0\n").code, ErrorCode::MatrixShape);
        QCOMPARE(code("1 0\n0 x\n").code, ErrorCode::CellNotANumber);
        QCOMPARE(code("").code, ErrorCode::NoDataRows);
        Record robust = stated(clause9(), Method::Robust, Clause9Matrix);
        QCOMPARE(refused(robust, "line").code, ErrorCode::MethodUnfit);
        Record unused = stated(clause9(), Method::LeastSquares, Clause9Matrix);
        unused.choices.weights = Weights::Equal;
        unused.choices.covariance = CovarianceScale::Residuals;
        QCOMPARE(fitted(unused, "line").fit.warnings.front().code, WarningCode::MatrixUnused);
        TypedReadings large = clause8();
        large.uCovariance[3] = "-0.081";
        Record tooLarge = stated(large, Method::BothUncertain);
        const Error error = refused(tooLarge, "line");
        QCOMPARE(error.code, ErrorCode::CovarianceTooLarge);
        QCOMPARE(std::string(error.fact("rows")), std::string("4"));
        Record shared = stated(clause8(), Method::LeastSquares);
        shared.standards = {standardWith("P", "0.1")};
        shared.choices.sharedError = SharedError::Fit;
        QCOMPARE(std::string(refused(shared, "line").fact("reason")), std::string("abscissa"));
        shared.choices.method = Method::BothUncertain;
        shared.choices.covariance = CovarianceScale::Residuals;
        QCOMPARE(std::string(refused(shared, "line").fact("reason")), std::string("scaled"));
    }

    /// Tabs, semicolons and decimal commas as they are pasted.
    void matricesAsTheyArePasted() {
        const auto commas = readMatrix("0,5\t0\n0\t1,25\n"), semicolons = readMatrix("# u²\n0,5;0\n\n0;1,25\r\n"), plain = readMatrix("0.5,0\n0,1.25");
        for (const auto* read : {&commas, &semicolons, &plain}) {
            QVERIFY(read->ok());
            QCOMPARE((**read)[1][1].text(), std::string("1.25"));
            QCOMPARE((**read)[0][0].text(), std::string("0.5"));
        }
    }
};

QTEST_APPLESS_MAIN(CorrelatedFit)
#include "tst_correlated_fit.moc"
