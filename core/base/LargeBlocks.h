// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

namespace spanwright {

/// Has the process keep large blocks that were given back, for the next evaluation: columns of very many readings are
/// otherwise fetched from the system page by page each time, a quarter of the whole time. Once, at the start of the program.
void keepLargeBlocks();

} // namespace spanwright
