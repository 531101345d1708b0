// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/Weighting.h"

#include <algorithm>
#include <cmath>
#include <map>

namespace spanwright {

VarianceProfile::VarianceProfile(const std::vector<double>& x, const std::vector<double>& variance) {
    struct Sum {
        double variance = 0;
        std::size_t n = 0;
    };
    std::map<double, Sum> places;
    for (std::size_t i = 0; i < x.size(); ++i) {
        Sum& place = places[x[i]];
        place.variance += variance[i];
        place.n += 1;
    }
    for (const auto& [at, sum] : places) {
        x_.push_back(at);
        variance_.push_back(sum.variance / static_cast<double>(sum.n));
    }
}

double VarianceProfile::at(double x) const {
    if (x_.empty())
        return 1.0;
    const auto i = static_cast<std::size_t>(std::upper_bound(x_.begin(), x_.end(), x) - x_.begin());
    if (i == 0 || i == x_.size())
        return i == 0 ? variance_.front() : variance_.back();
    const double share = (x - x_[i - 1]) / (x_[i] - x_[i - 1]);
    return variance_[i - 1] + share * (variance_[i] - variance_[i - 1]);
}

bool VarianceProfile::constant() const {
    return std::all_of(variance_.begin(), variance_.end(), [this](double v) { return v == variance_.front(); });
}

std::string rowsFact(const Sample& sample, const std::vector<std::size_t>& at) {
    constexpr std::size_t Shown = 12;
    std::string text;
    for (std::size_t i = 0; i < at.size() && i < Shown; ++i)
        text += (i > 0 ? ", " : "") + std::to_string(sample.rows[at[i]] + 1);
    return at.size() > Shown ? text + ", …" : text;
}

Result<Weighting> statedWeighting(const Sample& sample, const PairColumn& x, const PairColumn& u) {
    std::vector<std::size_t> missing, notPositive;
    for (std::size_t i = 0; i < sample.size(); ++i) {
        const bool known = !u.empty() && u.high[i] == u.high[i];
        if (!known)
            missing.push_back(i);
        else if (!(u.high[i] > 0.0))
            notPositive.push_back(i);
    }
    if (!missing.empty())
        return Error(ErrorCode::UncertaintyMissing, {{"rows", rowsFact(sample, missing)}});
    if (!notPositive.empty())
        return Error(ErrorCode::UncertaintyNotPositive, {{"rows", rowsFact(sample, notPositive)}});
    Weighting weighting;
    std::vector<double> variance;
    for (std::size_t i = 0; i < sample.size(); ++i) {
        weighting.rootWeight.push_back(1.0 / u[i]);
        variance.push_back(u.high[i] * u.high[i]);
    }
    weighting.profile = VarianceProfile(x.high, variance);
    return weighting;
}

namespace {

/// Standard deviation of the residuals at each set point, with ν = n − 1 and the mean |x|.
struct Spread {
    double sd = 0, freedom = 0, place = 0;
};

std::vector<Spread> spreadAtSetPoints(const Sample& sample, const PairColumn& x,
                                      const std::vector<DoubleDouble>& residual) {
    std::vector<DoubleDouble> sum(sample.groupValue.size(), 0.0), square(sample.groupValue.size(), 0.0);
    std::vector<Spread> spread(sample.groupValue.size());
    for (std::size_t i = 0; i < sample.size(); ++i) {
        const auto g = static_cast<std::size_t>(sample.group[i]);
        sum[g] += residual[i];
        spread[g].freedom += 1;
        spread[g].place += std::fabs(x.high[i]);
    }
    for (std::size_t i = 0; i < sample.size(); ++i) {
        const auto g = static_cast<std::size_t>(sample.group[i]);
        square[g] += sqr(residual[i] - sum[g] / spread[g].freedom);
    }
    for (std::size_t g = 0; g < spread.size(); ++g) {
        spread[g].place /= spread[g].freedom;
        spread[g].freedom -= 1;
        spread[g].sd = spread[g].freedom > 0 ? std::sqrt(toDouble(square[g]) / spread[g].freedom) : 0.0;
    }
    return spread;
}

/// A weighting from u_i in double.
Weighting fromUncertainties(const PairColumn& x, const std::vector<double>& u) {
    Weighting weighting;
    std::vector<double> variance;
    for (const double value : u) {
        weighting.rootWeight.push_back(DoubleDouble(1.0) / value);
        variance.push_back(value * value);
    }
    weighting.profile = VarianceProfile(x.high, variance);
    return weighting;
}

struct Straight {
    double c0 = 0, c1 = 0;
};

/// Share of the pooled standard deviation below which c0 is not taken, so that no reading counts as perfect (common
/// practice).
constexpr double LeastConstant = 0.1;

double pooled(const std::vector<Spread>& points) {
    double square = 0, freedom = 0;
    for (const Spread& spread : points) {
        square += spread.freedom * spread.sd * spread.sd;
        freedom += spread.freedom;
    }
    return std::sqrt(square / freedom);
}

/// c0 + c1 x with c0 ≥ `least` and c1 ≥ 0, weights w.
Straight boundedLine(const std::vector<Spread>& points, const std::vector<double>& w, double least) {
    double sw = 0, sx = 0, sy = 0, sxx = 0, sxy = 0;
    for (std::size_t i = 0; i < points.size(); ++i) {
        sw += w[i];
        sx += w[i] * points[i].place;
        sy += w[i] * points[i].sd;
        sxx += w[i] * points[i].place * points[i].place;
        sxy += w[i] * points[i].place * points[i].sd;
    }
    const double determinant = sw * sxx - sx * sx;
    const Straight free{(sxx * sy - sx * sxy) / determinant, (sw * sxy - sx * sy) / determinant};
    if (!(free.c1 > 0))
        return {std::max(least, sy / sw), 0};
    return free.c0 >= least ? free : Straight{least, std::max(0.0, (sxy - least * sx) / sxx)};
}

} // namespace

Result<Weighting> replicateWeighting(const Sample& sample, const PairColumn& x,
                                     const std::vector<DoubleDouble>& residual) {
    const std::vector<Spread> spread = spreadAtSetPoints(sample, x, residual);
    std::vector<std::size_t> without;
    std::vector<double> u;
    for (std::size_t i = 0; i < sample.size(); ++i) {
        u.push_back(spread[static_cast<std::size_t>(sample.group[i])].sd);
        if (!(u.back() > 0))
            without.push_back(i);
    }
    if (!without.empty())
        return Error(ErrorCode::NoSpread, {{"rows", rowsFact(sample, without)}});
    return fromUncertainties(x, u);
}

Result<Weighting> varianceFunctionWeighting(const Sample& sample, const PairColumn& x,
                                            const std::vector<DoubleDouble>& residual) {
    std::vector<Spread> points = spreadAtSetPoints(sample, x, residual);
    std::erase_if(points, [](const Spread& spread) { return !(spread.freedom > 0); });
    if (points.size() < 2)
        return Error(ErrorCode::TooFewReplicates, {{"needed", "2"}, {"got", std::to_string(points.size())}});
    std::vector<double> w;
    for (const Spread& spread : points)
        w.push_back(spread.freedom);
    const double least = LeastConstant * pooled(points);
    Straight line = boundedLine(points, w, least);
    for (int iteration = 0; iteration < 50 && least > 0; ++iteration) {
        for (std::size_t i = 0; i < points.size(); ++i) {
            const double u = line.c0 + line.c1 * points[i].place;
            w[i] = points[i].freedom / (u * u);
        }
        line = boundedLine(points, w, least);
    }
    std::vector<double> u;
    std::vector<std::size_t> without;
    for (std::size_t i = 0; i < sample.size(); ++i) {
        u.push_back(line.c0 + line.c1 * std::fabs(x.high[i]));
        if (!(u.back() > 0))
            without.push_back(i);
    }
    if (!without.empty())
        return Error(ErrorCode::NoSpread, {{"rows", rowsFact(sample, without)}});
    return fromUncertainties(x, u);
}

Result<Weighting> proportionalWeighting(const Sample& sample, const PairColumn& x) {
    std::vector<std::size_t> atZero;
    std::vector<double> u;
    for (std::size_t i = 0; i < sample.size(); ++i) {
        u.push_back(std::fabs(x.high[i]));
        if (u.back() == 0)
            atZero.push_back(i);
    }
    if (!atZero.empty())
        return Error(ErrorCode::LevelZero, {{"rows", rowsFact(sample, atZero)}});
    return fromUncertainties(x, u);
}

} // namespace spanwright
