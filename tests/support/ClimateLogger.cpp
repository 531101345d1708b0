// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/ClimateLogger.h"

#include <array>
#include <chrono>
#include <cmath>
#include <cstdint>
#include <cstdio>

namespace spanwright::test {

namespace {

constexpr std::array plateaus{-20.0, 0.0, 20.0, 40.0, 60.0, 80.0, 60.0, 20.0, -20.0};
constexpr int plateauSeconds = 5400;
constexpr int step = 30;
constexpr double chamberSeconds = 420.0; ///< time constant of the air
constexpr double probeSeconds = 95.0;    ///< lag of the probes

class Noise {
  public:
    /// Nearly normal, mean 0, standard deviation 1: twelve uniform numbers added.
    double next() {
        double sum = -6.0;
        for (int i = 0; i < 12; ++i) {
            state_ = state_ * 6364136223846793005U + 1442695040888963407U;
            sum += static_cast<double>(state_ >> 40U) / 16777216.0;
        }
        return sum;
    }

  private:
    std::uint64_t state_ = 20'318;
};

/// A probe's error with autocorrelated noise: standard deviation 0.008 K, correlation 0.95 from 10 s to 10 s.
class Probe {
  public:
    Probe(double offset, double slope, double bow) : offset_(offset), slope_(slope), bow_(bow) {}
    double read(double temperature, Noise& noise) {
        constexpr double rho = 0.95 * 0.95 * 0.95;
        wander_ = rho * wander_ + 0.008 * std::sqrt(1.0 - rho * rho) * noise.next();
        return temperature + offset_ + slope_ * temperature + bow_ * temperature * temperature + wander_;
    }

  private:
    double offset_, slope_, bow_;
    double wander_ = 0;
};

std::string cell(double value, int decimals) {
    std::array<char, 32> text{};
    std::snprintf(text.data(), text.size(), "%.*f", decimals, value);
    std::string result = text.data();
    if (const auto mark = result.find('.'); mark != std::string::npos)
        result[mark] = ',';
    return result;
}

/// Seconds since the first row, as the logger's clock shows them: set back by an hour on 25 October 2026 at 03:00.
std::string clockText(int seconds) {
    using namespace std::chrono;
    const sys_seconds start = sys_days{October / 24 / 2026} + 20h;
    sys_seconds shown = start + std::chrono::seconds{seconds};
    if (shown >= sys_days{October / 25 / 2026} + 3h)
        shown -= 1h;
    const auto day = floor<days>(shown);
    const year_month_day date{day};
    const hh_mm_ss time{shown - day};
    std::array<char, 48> text{};
    std::snprintf(text.data(), text.size(), "%02u.%02u.%04d %02d:%02d:%02d", unsigned(date.day()), unsigned(date.month()),
                  int(date.year()), int(time.hours().count()), int(time.minutes().count()), int(time.seconds().count()));
    return text.data();
}

} // namespace

std::string climateLogger() {
    std::string text = "time;ref;P1;P2;P3;rh\n;°C;°C;°C;°C;%\n";
    Noise noise;
    Probe p1(0.11, 0.0012, 1.1e-5);
    Probe p2(-0.06, 0.0007, -0.4e-5);
    Probe p3(0.09, -0.0009, 0.8e-5);
    double air = 22.0;
    double probe = 22.0;
    const int total = int(plateaus.size()) * plateauSeconds;
    for (int second = 0, row = 0; second < total; ++second) {
        air += (plateaus[std::size_t(second / plateauSeconds)] - air) / chamberSeconds;
        probe += (air - probe) / probeSeconds;
        if (second % step != 0)
            continue;
        std::array cells{cell(air + 0.002 * noise.next(), 3), cell(p1.read(probe, noise), 3), cell(p2.read(probe, noise), 3),
                         cell(p3.read(probe, noise) * 1.8 + 32.0, 2), cell(45.0 + 0.3 * noise.next(), 1)};
        ++row;
        if (row > 905 && row <= 919)
            continue;
        if (row % 331 == 17)
            cells[std::size_t(row) % 4].clear();
        if (row % 401 == 90)
            cells[1] = "OVR";
        std::string line = clockText(second);
        for (const std::string& one : cells)
            line += ';' + one;
        line += '\n';
        text += line;
        if (row == 640)
            text += line;
    }
    return text;
}

} // namespace spanwright::test
