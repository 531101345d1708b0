// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstdint>

namespace spanwright {

/// The kernels know no header, and so no std::int64_t.
inline const long* asLong(const std::int64_t* m) {
    static_assert(sizeof(long) == sizeof(std::int64_t));
    return reinterpret_cast<const long*>(m);
}

inline constexpr int MostStreamedDegree = 10;

/// Readings on their decimal grids, a multiple of four: t = (x − x0)·xStep in about [−1, 1], v = y − y0, exact.
struct StreamBlock {
    const long* x = nullptr;
    const long* y = nullptr;
    unsigned long n = 0;
    long x0 = 0, y0 = 0;
    double xStep = 1, yUnit = 1;
};

/// Kept while streaming: the lowest and highest x, and the bits of y − y0 + 2^51 of all readings together.
struct StreamRange {
    long low = 0, high = 0;
    unsigned long wide = 0;
};

/// A polynomial of degree m in t as even(s) + t·odd(s), s = 2t² − 1 in [−1, 1], both in powers of s: half the degree, so that
/// powers lose few digits, and half the work.
struct EvenOdd {
    double even[MostStreamedDegree + 1] = {}; ///< k = 0…m/2
    double odd[MostStreamedDegree + 1] = {};  ///< k = 0…(m − 1)/2
};

/// Abscissae, a multiple of four, with t = (x − centre)·scale; the function f of degree d, and u² of one new reading of degree
/// 2d.
struct BandBlock {
    const double* x = nullptr;
    unsigned long n = 0;
    double centre = 0, scale = 1;
    EvenOdd value, variance;
    double factor = 0;
};

/// The inner loops by degree d of the polynomial, written in StreamKernel.inc for every processor and for AVX2, with
/// equal bits.
struct StreamKernel {
    /// Σ T_j(t) for j = 0…2d, Σ T_j(t) v for j = 0…d, Σ v².
    void (*moments[MostStreamedDegree + 1])(const StreamBlock&, double*, StreamRange&);
    /// With e = v − Σ c_j T_j(t): Σ T_j(t) e for j = 0…d, Σ e².
    void (*residuals[MostStreamedDegree + 1])(const StreamBlock&, const double*, double*);
    /// e·yUnit and Σ h_j T_j(t), j = 0…2d, of every reading.
    void (*elements[MostStreamedDegree + 1])(const StreamBlock&, const double*, const double*, double*, double*);
    /// f, f − factor·u and f + factor·u at every abscissa.
    void (*band[MostStreamedDegree + 1])(const BandBlock&, double*, double*, double*);
    /// m/divisor of n integers, a multiple of four; holds only if no bit from 2^52 on is set in what it returns.
    unsigned long (*quotients)(const long*, unsigned long, double, double*);
    /// For each of n integers m ≥ low, how many bits of a map lie below bit m − low; given how many lie below each word of 64.
    void (*ranks)(const long*, unsigned long, long, const unsigned long*, const int*, int*);
};

namespace plain {
extern const StreamKernel kernel;
}
namespace avx2 {
extern const StreamKernel kernel;
}

/// The one that this processor runs fastest.
const StreamKernel& streamKernel();

} // namespace spanwright
