// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/certificate/Certificate.h"
#include "ui/certificate/Flow.h"

#include <QStringList>

namespace spanwright {

/// The sections of the certificate in their order; each adds to the flow what the certificate has for it.
void addTitle(Flow& flow, const Certificate& certificate, const QStringList& gaps);
void addIdentification(Flow& flow, const Certificate& certificate);
void addStandards(Flow& flow, const Certificate& certificate);
void addConditions(Flow& flow, const Certificate& certificate);
void addSummary(Flow& flow, const Certificate& certificate);
void addResults(Flow& flow, const Certificate& certificate, const PhaseSection& section);
void addFunction(Flow& flow, const Certificate& certificate);
void addSplit(Flow& flow, const Certificate& certificate, const PhaseSection& section);
void addBudget(Flow& flow, const Certificate& certificate, const PhaseSection& section);
void addPerformance(Flow& flow, const Certificate& certificate, const PhaseSection& section);
void addForce(Flow& flow, const Certificate& certificate, const PhaseSection& section);
void addExclusions(Flow& flow, const Certificate& certificate);
void addStatements(Flow& flow, const Certificate& certificate, const QStringList& gaps);
void addSignOffs(Flow& flow, const Certificate& certificate);

/// "10 bar", with a space that does not break.
QString withUnit(const QString& number, const std::string& unit);
/// The text, or – where it is empty.
QString orDash(const std::string& text);

} // namespace spanwright
