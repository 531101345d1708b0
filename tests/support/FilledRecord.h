// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Record.h"

namespace spanwright::test {

/// A record in which every field of every part differs from its default and from every other, lists have two members, and
/// texts hold what JSON must escape. Found by walking fields(), so that a new field is in it by itself.
Record filledRecord();

} // namespace spanwright::test
