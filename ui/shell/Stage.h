// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QString>

#include <array>
#include <optional>

namespace spanwright {

/// The work in its order.
enum class Stage { Job, Bench, Budget, Certificate };
inline constexpr std::array allStages{Stage::Job, Stage::Bench, Stage::Budget, Stage::Certificate};

/// "job", "bench", "budget", "certificate".
QString stageName(Stage stage);
std::optional<Stage> stageOfName(const QString& name);
/// As it stands on screen.
QString stageTitle(Stage stage);

} // namespace spanwright
