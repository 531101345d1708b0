// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/Weighting.h"

#include <algorithm>
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

} // namespace spanwright
