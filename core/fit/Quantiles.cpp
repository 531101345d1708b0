// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/Quantiles.h"

#include <boost/math/distributions/chi_squared.hpp>
#include <boost/math/distributions/fisher_f.hpp>
#include <boost/math/distributions/normal.hpp>
#include <boost/math/distributions/students_t.hpp>
#include <boost/math/special_functions/beta.hpp>

#include <limits>

namespace spanwright {

namespace {

using boost::math::complement;

// Statistics of a user's data may be infinite (a perfect fit) or undefined: that is an answer here, never an exception.
using Quiet =
    boost::math::policies::policy<boost::math::policies::domain_error<boost::math::policies::ignore_error>,
                                  boost::math::policies::pole_error<boost::math::policies::ignore_error>,
                                  boost::math::policies::overflow_error<boost::math::policies::ignore_error>,
                                  boost::math::policies::evaluation_error<boost::math::policies::ignore_error>,
                                  boost::math::policies::promote_double<true>>;
using Student = boost::math::students_t_distribution<double, Quiet>;
using Normal = boost::math::normal_distribution<double, Quiet>;
using Fisher = boost::math::fisher_f_distribution<double, Quiet>;
using ChiSquared = boost::math::chi_squared_distribution<double, Quiet>;

constexpr double NoValue = std::numeric_limits<double>::quiet_NaN();

} // namespace

double studentQuantileAbove(double tail, double df) {
    return df > 0 ? quantile(complement(Student(df), tail)) : NoValue;
}

double normalQuantileAbove(double tail) {
    return quantile(complement(Normal(), tail));
}

double fQuantileAbove(double tail, double df1, double df2) {
    if (!(df1 > 0 && df2 > 0))
        return NoValue;
    double y = 1.0; // 1 − x without cancellation; F = (df2/df1)·x/y
    const double x = boost::math::ibetac_inv(df1 / 2, df2 / 2, tail, &y, Quiet());
    return df2 * x / (df1 * y);
}

double chiSquaredQuantileAbove(double tail, double df) {
    return df > 0 ? quantile(complement(ChiSquared(df), tail)) : NoValue;
}

double chiSquaredAbove(double x, double df) {
    return df > 0 && x == x ? cdf(complement(ChiSquared(df), x)) : NoValue;
}

double fAbove(double x, double df1, double df2) {
    if (!(df1 > 0 && df2 > 0) || x != x)
        return NoValue;
    return x > std::numeric_limits<double>::max() ? 0.0 : cdf(complement(Fisher(df1, df2), x));
}

double studentAbove(double x, double df) {
    if (!(df > 0) || x != x)
        return NoValue;
    return cdf(complement(Student(df), x));
}

} // namespace spanwright
