// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/exchange/CsvRules.h"

namespace spanwright {

/// What the cells of one column say about how it is to be read.
class ColumnEvidence {
  public:
    void add(const std::string& cell);

    [[nodiscard]] ColumnKind kind() const;

    /// The mark that the cells leave no doubt about: one of the two occurs, and not only as "1.408", which may be thousands.
    [[nodiscard]] std::optional<DecimalMark> clearMark() const;
    /// The mark to read with, given what other columns of the file say.
    [[nodiscard]] DecimalMark mark(std::optional<DecimalMark> ofFile) const;
    [[nodiscard]] bool markUnclear(std::optional<DecimalMark> ofFile, char separator) const;

    [[nodiscard]] DateOrder dateOrder() const;
    [[nodiscard]] bool dateOrderUnclear() const;

    /// Usual words for no value that occur in a column of numbers or times.
    [[nodiscard]] std::vector<std::string> missingWords() const;
    /// A cell that shows the doubt.
    [[nodiscard]] const std::string& example() const { return example_; }

  private:
    struct Mark {
        std::size_t cells = 0;   ///< cells that have it
        std::size_t read = 0;    ///< of these, cells that read as a number with it
        std::size_t grouped = 0; ///< of these, cells that read as thousands too
    };
    static bool couldBeGroups(std::string_view cell, char mark);

    std::size_t filled_ = 0, numbers_ = 0, times_ = 0, texts_ = 0, wholes_ = 0;
    Mark point_, comma_;
    std::size_t dayFirst_ = 0, monthFirst_ = 0, yearFirst_ = 0, slashes_ = 0, halves_ = 0;
    std::vector<std::string> words_;
    std::string example_;
};

} // namespace spanwright
