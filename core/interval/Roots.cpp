// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/interval/Roots.h"

#include <boost/math/tools/minima.hpp>
#include <boost/math/tools/toms748_solve.hpp>

#include <algorithm>
#include <cmath>
#include <limits>

namespace spanwright {

namespace {

constexpr int Steps = 400;

double along(double from, double to, int step) {
    return step == Steps ? to : from + (to - from) * step / Steps;
}

} // namespace

RangeOfSearch searchRange(const Fit& fit) {
    const double span = fit.high > fit.low ? fit.high - fit.low : std::max(1.0, std::fabs(fit.low));
    const auto reach = [&](double from, double step) {
        const auto exists = [&](double x) { return std::isfinite(fit.curve->value(x)); };
        double to = from;
        for (int i = 1; i <= 64 && exists(from + step * i / 64); ++i)
            to = from + step * i / 64;
        if (to == from + step)
            return to;
        // Up to where the function ends.
        double beyond = to + step / 64;
        for (int halving = 0; halving < 40; ++halving) {
            const double middle = to + (beyond - to) / 2;
            (exists(middle) ? to : beyond) = middle;
        }
        return to;
    };
    return {reach(fit.low, -span), reach(fit.high, span)};
}

std::optional<Crossing> firstCrossing(const RealFunction& f, double from, double limit) {
    double inner = from;
    for (int step = 1; step <= Steps; ++step) {
        // Quadratic spacing: an interval is mostly narrow against the range.
        const double share = static_cast<double>(step) / Steps;
        const double at = step == Steps ? limit : from + (limit - from) * share * share;
        if (f(at) > 0)
            return Crossing{inner, at};
        inner = at;
    }
    return std::nullopt;
}

double rootBetween(const RealFunction& f, double a, double b) {
    const double fa = f(a), fb = f(b);
    if (fa == 0 || fb == 0)
        return fa == 0 ? a : b;
    if ((fa > 0) == (fb > 0))
        return std::fabs(fa) < std::fabs(fb) ? a : b;
    std::uintmax_t iterations = 200;
    const auto [low, high] = a < b ? boost::math::tools::toms748_solve(
                                         f, a, b, fa, fb, boost::math::tools::eps_tolerance<double>(53), iterations)
                                   : boost::math::tools::toms748_solve(
                                         f, b, a, fb, fa, boost::math::tools::eps_tolerance<double>(53), iterations);
    return low + (high - low) / 2;
}

std::vector<double> rootsIn(const RealFunction& f, double low, double high) {
    std::vector<double> roots;
    const auto add = [&](double root) {
        if (roots.empty() || root > roots.back())
            roots.push_back(root);
    };
    double before = std::numeric_limits<double>::quiet_NaN(), xa = low, fa = f(low);
    for (int step = 1; step <= Steps && high > low; ++step) {
        const double xb = along(low, high, step), fb = f(xb);
        if (fa == 0) {
            add(xa);
        } else if (fa * fb < 0) {
            add(rootBetween(f, xa, xb));
        } else if (fa * before > 0 && std::fabs(fa) < std::fabs(before) && std::fabs(fa) < std::fabs(fb)) {
            // |f| has a least value near xa without a change of sign on the grid: it may touch or cross zero twice.
            const double sign = fa > 0 ? 1.0 : -1.0;
            const double xBefore = along(low, high, step - 2);
            const auto [x, least] =
                boost::math::tools::brent_find_minima([&](double at) { return sign * f(at); }, xBefore, xb, 52);
            if (least < 0) {
                add(rootBetween(f, xBefore, x));
                add(rootBetween(f, x, xb));
            } else if (least == 0) {
                add(x);
            }
        }
        before = fa;
        xa = xb;
        fa = fb;
    }
    if (fa == 0)
        add(xa);
    return roots;
}

} // namespace spanwright
