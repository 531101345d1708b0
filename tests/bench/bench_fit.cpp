// SPDX-License-Identifier: GPL-3.0-or-later
// Accuracy and speed of the fit of very many readings: digits against the same fit in 113-bit arithmetic, and times as
// ratios against summing the two columns, against gsl_fit_linear and against Eigen's column-pivoting QR, all in one
// run.
#include "core/fit/StreamedFit.h"
#include "tests/bench/Stopwatch.h"
#include "core/fit/fitFunction.h"
#include "core/interval/Bands.h"

#include <Eigen/QR>
#include <gsl/gsl_fit.h>

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <cstdlib>
#include <cstring>
#include <functional>
#include <random>
#include <vector>

#include <time.h>

using namespace spanwright;

namespace {

using Quad = __float128;

/// Least time of some runs, of the processor for this thread alone: other programs on the machine then hardly show.
double seconds(const std::function<void()>& work, int repeats) {
    const auto now = [] {
        timespec time{};
        clock_gettime(CLOCK_THREAD_CPUTIME_ID, &time);
        return static_cast<double>(time.tv_sec) + 1e-9 * static_cast<double>(time.tv_nsec);
    };
    double least = 1e9;
    for (int i = 0; i < repeats; ++i) {
        const double start = now();
        work();
        least = std::min(least, now() - start);
    }
    return least;
}

struct Data {
    std::vector<std::int64_t> x, y;
    int xScale = 6, yScale = 8;

    [[nodiscard]] GridColumn gx() const { return {x, xScale}; }
    [[nodiscard]] GridColumn gy() const { return {y, yScale}; }
};

/// x = from + [0, span] with 6 decimals in random order, y a curve with noise of 10⁻³ of its range, 8 decimals.
Data makeData(std::size_t n, double from, double span) {
    std::mt19937_64 random(20261201);
    std::uniform_real_distribution<double> place(0.0, 1.0);
    std::normal_distribution<double> noise(0.0, 0.016);
    Data data;
    for (std::size_t i = 0; i < n; ++i) {
        const double share = place(random);
        data.x.push_back(std::llround((from + share * span) * 1e6));
        data.y.push_back(std::llround((4 + 16 * share + 0.05 * std::sin(6 * share) + noise(random)) * 1e8));
    }
    return data;
}

Quad quadPower(int exponent) {
    Quad power = 1;
    for (int i = 0; i < std::abs(exponent); ++i)
        power *= 10;
    return exponent < 0 ? 1 / power : power;
}

Quad quadRoot(Quad value) {
    Quad root = std::sqrt(static_cast<double>(value));
    for (int i = 0; i < 4; ++i)
        root = (root + value / root) / 2;
    return root;
}

/// Coefficients as raw powers, their standard deviations and Σe², from normal equations in powers of the centred
/// abscissa.
struct Exact {
    std::vector<Quad> b, sd;
    Quad ss = 0;
};

std::vector<Quad> inverseOf(std::vector<Quad> a, std::size_t p) {
    std::vector<Quad> inverse(p * p, 0);
    for (std::size_t i = 0; i < p; ++i)
        inverse[i * p + i] = 1;
    for (std::size_t k = 0; k < p; ++k) {
        const Quad pivot = a[k * p + k];
        for (std::size_t j = 0; j < p; ++j) {
            a[k * p + j] /= pivot;
            inverse[k * p + j] /= pivot;
        }
        for (std::size_t i = 0; i < p; ++i) {
            const Quad factor = a[i * p + k];
            if (i == k)
                continue;
            for (std::size_t j = 0; j < p; ++j) {
                a[i * p + j] -= factor * a[k * p + j];
                inverse[i * p + j] -= factor * inverse[k * p + j];
            }
        }
    }
    return inverse;
}

Exact exactFit(const Data& data, int degree) {
    const std::size_t p = static_cast<std::size_t>(degree) + 1, n = data.x.size();
    const auto [low, high] = std::minmax_element(data.x.begin(), data.x.end());
    const Quad centre = (static_cast<Quad>(*low) + static_cast<Quad>(*high)) / 2,
               half = (static_cast<Quad>(*high) - static_cast<Quad>(*low)) / 2;
    const Quad unit = quadPower(-data.yScale);
    std::vector<Quad> gram(p * p, 0), right(p, 0), power(p);
    const auto fill = [&](std::size_t i) {
        power[0] = 1;
        for (std::size_t k = 1; k < p; ++k)
            power[k] = power[k - 1] * (static_cast<Quad>(data.x[i]) - centre) / half;
    };
    for (std::size_t i = 0; i < n; ++i) {
        fill(i);
        for (std::size_t j = 0; j < p; ++j) {
            right[j] += power[j] * static_cast<Quad>(data.y[i]) * unit;
            for (std::size_t k = 0; k < p; ++k)
                gram[j * p + k] += power[j] * power[k];
        }
    }
    const std::vector<Quad> inverse = inverseOf(gram, p);
    std::vector<Quad> c(p, 0);
    for (std::size_t j = 0; j < p; ++j)
        for (std::size_t k = 0; k < p; ++k)
            c[j] += inverse[j * p + k] * right[k];
    Exact exact;
    for (std::size_t i = 0; i < n; ++i) {
        fill(i);
        Quad e = static_cast<Quad>(data.y[i]) * unit;
        for (std::size_t k = 0; k < p; ++k)
            e -= c[k] * power[k];
        exact.ss += e * e;
    }
    // c_k ((x − centre)/half)^k as powers of x, in the user's unit
    const Quad shift = -centre / half, scale = quadPower(data.xScale) / half;
    std::vector<Quad> rows(p * p, 0);
    rows[0] = 1;
    for (std::size_t k = 1; k < p; ++k)
        for (std::size_t j = 0; j <= k; ++j)
            rows[k * p + j] =
                shift * rows[(k - 1) * p + j] + (j > 0 ? scale * rows[(k - 1) * p + j - 1] : static_cast<Quad>(0));
    for (std::size_t j = 0; j < p; ++j) {
        Quad value = 0, variance = 0;
        for (std::size_t k = 0; k < p; ++k) {
            value += rows[k * p + j] * c[k];
            for (std::size_t l = 0; l < p; ++l)
                variance += rows[k * p + j] * inverse[k * p + l] * rows[l * p + j];
        }
        exact.b.push_back(value);
        exact.sd.push_back(quadRoot(variance * exact.ss / static_cast<double>(n - p)));
    }
    return exact;
}

double digits(double got, Quad want) {
    const double error = std::fabs(static_cast<double>((got - want) / want));
    return error == 0 ? 17 : std::min(17.0, -std::log10(error));
}

Record recordOf(const Data& data) {
    Record record;
    ReadingColumns::Block block;
    block.n = data.x.size();
    block.reference = DecimalColumn::fromGrid(data.x, std::vector<std::uint8_t>(data.x.size(), 6), data.xScale);
    block.indication = DecimalColumn::fromGrid(data.y, std::vector<std::uint8_t>(data.y.size(), 8), data.yScale);
    record.readings.edit().appendBlock(std::move(block), 1);
    return record;
}

void accuracy(const char* words, double from, double span) {
    const Data data = makeData(1'000'000, from, span);
    Record record = recordOf(data);
    const Sample sample = makeSample(record, Phase::AsFound);
    for (const char* name : {"line", "polynomial:2", "polynomial:6"}) {
        record.choices.function = *parseFunctionName(name);
        const auto outcome = fitFunction(sample, record.choices);
        const Exact exact = exactFit(data, static_cast<int>(outcome->fit.terms()) - 1);
        double b = 17, sd = 17;
        for (std::size_t k = 0; k < exact.b.size(); ++k) {
            b = std::min(b, digits(outcome->fit.coefficients[k].value, exact.b[k]));
            sd = std::min(sd, digits(outcome->fit.coefficients[k].standardUncertainty, exact.sd[k]));
        }
        std::printf("accuracy  %-14s %-13s coefficients %.1f  uncertainties %.1f  sum of squares %.1f digits\n", words,
                    name, b, sd, digits(outcome->fit.residualSs, exact.ss));
    }
}

double summed(const Data& data) {
    std::int64_t sum[4] = {};
    for (std::size_t i = 0; i + 2 <= data.x.size(); i += 2) {
        sum[0] += data.x[i];
        sum[1] += data.x[i + 1];
        sum[2] += data.y[i];
        sum[3] += data.y[i + 1];
    }
    return static_cast<double>(sum[0] + sum[1] + sum[2] + sum[3]);
}

volatile double sink;

void speed(std::size_t n) {
    const Data data = makeData(n, 0, 100);
    const double reading = seconds([&] { sink = summed(data); }, 9);
    std::printf("speed     n = %zu, summing both columns %.2f ns a reading\n", n,
                reading / static_cast<double>(n) * 1e9);
    for (const int degree : {1, 2, 6}) {
        const double fit = seconds(
            [&] { sink = toDouble(fitStreamed(data.gx(), data.gy(), degree, StreamedConstant::With, 1)->residualSs); },
            9);
        std::printf("speed     degree %d, one thread: full fit %.2f ns a reading, %.2f times summing\n", degree,
                    fit / static_cast<double>(n) * 1e9, fit / reading);
    }
}

void againstLibraries(std::size_t n) {
    const Data data = makeData(n, 0, 100);
    std::vector<double> x(n), y(n);
    for (std::size_t i = 0; i < n; ++i) {
        x[i] = static_cast<double>(data.x[i]) * 1e-6;
        y[i] = static_cast<double>(data.y[i]) * 1e-8;
    }
    const auto ours = [&](int degree) {
        return seconds(
            [&] { sink = toDouble(fitStreamed(data.gx(), data.gy(), degree, StreamedConstant::With, 1)->residualSs); },
            7);
    };
    const double gsl = seconds(
        [&] {
            double c0, c1, v00, v01, v11, ss;
            gsl_fit_linear(x.data(), 1, y.data(), 1, n, &c0, &c1, &v00, &v01, &v11, &ss);
            sink = ss;
        },
        5);
    std::printf("against   line, n = %zu: gsl_fit_linear takes %.1f times as long\n", n, gsl / ours(1));
    for (const int degree : {1, 2, 6}) {
        const double eigen = seconds(
            [&] {
                Eigen::MatrixXd a(static_cast<Eigen::Index>(n), degree + 1);
                for (std::size_t i = 0; i < n; ++i) {
                    double power = 1;
                    for (int k = 0; k <= degree; ++k, power *= x[i])
                        a(static_cast<Eigen::Index>(i), k) = power;
                }
                const Eigen::Map<const Eigen::VectorXd> right(y.data(), static_cast<Eigen::Index>(n));
                const Eigen::VectorXd b = a.colPivHouseholderQr().solve(right);
                sink = (right - a * b).squaredNorm();
            },
            3);
        std::printf("against   degree %d, n = %zu: column-pivoting QR takes %.0f times as long\n", degree, n,
                    eigen / ours(degree));
    }
}

void exclusion(std::size_t n) {
    const Data data = makeData(n, 0, 100);
    for (const int degree : {1, 2, 6}) {
        const StreamedFit all = *fitStreamed(data.gx(), data.gy(), degree, StreamedConstant::With, 1);
        const double full = seconds(
            [&] { sink = toDouble(fitStreamed(data.gx(), data.gy(), degree, StreamedConstant::With, 1)->residualSs); },
            5);
        StreamedFit chain = all;
        const double one = seconds(
                               [&] {
                                   chain = all;
                                   for (std::size_t i = 0; i < 1000; ++i)
                                       chain = *changedBy(chain, StreamedChange::Exclude, data.x[i * 7], data.y[i * 7]);
                               },
                               3) /
                           1000;
        Data rest;
        for (std::size_t i = 0; i < n; ++i)
            if (i >= 7000 || i % 7 != 0) {
                rest.x.push_back(data.x[i]);
                rest.y.push_back(data.y[i]);
            }
        // Both in the basis of all readings: the range of the rest may be smaller, so compare the function at nine
        // places.
        const StreamedFit refit = *fitStreamed(rest.gx(), rest.gy(), degree, StreamedConstant::With, 1);
        double worst = 0;
        for (int k = 0; k <= 8; ++k) {
            const auto valueOf = [&](const StreamedFit& fit) {
                const DoubleDouble t = (DoubleDouble(12.5 * k) - fit.sums.map.centre()) / fit.sums.map.half();
                DoubleDouble before = 1.0, now = t, sum = fit.beta[0];
                for (std::size_t j = 1; j < fit.beta.size(); ++j) {
                    sum += fit.beta[j] * now;
                    const DoubleDouble next = 2.0 * t * now - before;
                    before = now;
                    now = next;
                }
                return sum;
            };
            worst = std::max(worst, std::fabs(toDouble((valueOf(chain) - valueOf(refit)) / valueOf(refit))));
        }
        std::printf("exclusion degree %d, n = %zu: one reading in %.2f us, 1/%.0f of the full refit; 1000 in a chain "
                    "agree to %.1g (values), "
                    "%.1g (sum of squares)\n",
                    degree, n, one * 1e6, full / one, worst,
                    std::fabs(toDouble((chain.residualSs - refit.residualSs) / refit.residualSs)));
    }
}

void sameBits() {
    const Data data = makeData(300'001, 20000, 1);
    bool same = true;
    for (const int degree : {1, 2, 6}) {
        const auto one = fitStreamed(data.gx(), data.gy(), degree, StreamedConstant::With, 1);
        const auto two = fitStreamed(data.gx(), data.gy(), degree, StreamedConstant::With, 2);
        same = same && one->residualSs == two->residualSs && one->beta == two->beta;
    }
    std::printf("bits      1 and 2 threads: %s\n", same ? "equal" : "DIFFERENT");
}

void small() {
    for (const std::size_t n : {std::size_t{20}, std::size_t{1000}}) {
        Record record = recordOf(makeData(n, 0, 100));
        for (const char* name : {"line", "polynomial:2", "polynomial:6"}) {
            record.choices.function = *parseFunctionName(name);
            const Sample sample = makeSample(record, Phase::AsFound);
            std::printf("small     n = %zu, %s: %.0f us\n", n, name,
                        seconds([&] { sink = fitFunction(sample, record.choices)->fit.residualSs; }, 9) * 1e6);
        }
    }
}

void wholeRoad() {
    const Data data = makeData(1'000'000, 0, 100);
    Record record = recordOf(data);
    const double reading = test::wallSeconds([&] { sink = summed(data); }, 9);
    Sample sample;
    const double sampled = test::wallSeconds([&] { sample = makeSample(record, Phase::AsFound); }, 5);
    const double fitted = test::wallSeconds([&] { sink = fitFunction(sample, record.choices)->fit.residualSs; }, 5);
    std::printf(
        "road      n = 1000000: sample %.1f, fit with residuals and leverages %.1f times summing both columns\n",
        sampled / reading, fitted / reading);
}

void band(std::size_t n) {
    Record record = recordOf(makeData(1000, 0, 100));
    std::vector<double> x(n);
    for (std::size_t i = 0; i < n; ++i)
        x[i] = 100.0 * static_cast<double>(i) / static_cast<double>(n);
    const double copying = test::wallSeconds(
        [&] {
            const std::vector<double> a = x, b = x, c = x;
            sink = a[n / 2] + b[n / 3] + c[n / 4];
        },
        21);
    for (const char* name : {"line", "polynomial:2", "polynomial:6"}) {
        record.choices.function = *parseFunctionName(name);
        const Fit fit = fitFunction(makeSample(record, Phase::AsFound), record.choices)->fit;
        const double time = test::wallSeconds([&] { sink = newReadingBand(fit, x).high[n / 2]; }, 21);
        std::printf("band      %s at %zu places: %.2f times copying three columns in one thread, until it is there\n", name, n, time / copying);
    }
}

} // namespace

int main(int argc, char** argv) {
    const std::size_t n = argc > 1 ? static_cast<std::size_t>(std::atoll(argv[1])) : 10'000'000;
    small();
    sameBits();
    wholeRoad();
    speed(n);
    againstLibraries(1'000'000);
    exclusion(1'000'000);
    band(1'000'000);
    accuracy("0 … 100", 0, 100);
    accuracy("20000 … 20001", 20000, 1);
    return 0;
}
