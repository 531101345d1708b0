// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/PartsJson.h"

#include "core/record/Fields.h"
#include "core/session/RowReader.h"
#include "core/session/UnknownKeys.h"

#include <algorithm>
#include <limits>

namespace spanwright {

namespace {

struct Nothing {
    template <class T>
    void operator()(std::string_view, T&) const {}
};

template <class T>
concept Part = requires(T& part) { fields(part, Nothing{}); };
template <class T>
concept Named = requires { EnumNames<T>::names; };

using Layout = JsonText::Layout;

/// Small parts stand on one line.
template <class T>
constexpr bool isSmall = std::same_as<T, Quantity> || std::same_as<T, CorrectionPoint> || std::same_as<T, OmittedLine> ||
                         std::same_as<T, MatrixRow>;
template <class T>
constexpr Layout layoutOf = isSmall<T> ? Layout::OneLine : Layout::Lines;

class PartWriter {
  public:
    PartWriter(JsonText& json, const Record& record, std::string pointer)
        : json_(json), record_(record), pointer_(std::move(pointer)) {}

    void write(const std::string& text) { json_.string(text); }
    void write(bool flag) { json_.raw(flag ? "true" : "false"); }
    void write(int number) { json_.raw(std::to_string(number)); }
    void write(ReadingId id) { json_.raw(std::to_string(id)); }
    void write(const Decimal& number) { json_.string(number.text()); }
    void write(const FunctionChoice& choice) { json_.string(functionName(choice)); }
    template <Named E>
    void write(E value) {
        json_.string(nameOf(value));
    }
    template <class T>
    void write(const std::optional<T>& something) {
        if (something)
            write(*something);
        else
            json_.null();
    }
    template <class T>
    void write(const std::vector<T>& several) {
        json_.beginArray(Part<const T> ? Layout::Lines : Layout::OneLine);
        for (std::size_t i = 0; i < several.size(); ++i)
            within(childPointer(pointer_, i), several[i]);
        json_.endArray();
    }
    template <class P>
        requires Part<const P>
    void write(const P& part) {
        json_.beginObject(layoutOf<P>);
        fields(part, [this](std::string_view name, const auto& field) {
            json_.key(name);
            within(childPointer(pointer_, name), field);
        });
        writeUnknown(json_, record_, pointer_);
        json_.endObject();
    }

  private:
    template <class T>
    void within(std::string pointer, const T& value) {
        std::swap(pointer, pointer_);
        write(value);
        std::swap(pointer, pointer_);
    }

    JsonText& json_;
    const Record& record_;
    std::string pointer_;
};

class PartReader {
  public:
    PartReader(JsonScanner& scan, Record& record, std::string pointer)
        : scan_(scan), record_(record), pointer_(std::move(pointer)) {}

    void read(std::string& text) {
        if (scan_.atString())
            text = scan_.string();
        else
            bad(scan_.skip());
    }
    void read(bool& flag) {
        const std::string_view word = scan_.skip();
        if (word == "true" || word == "false")
            flag = word == "true";
        else
            bad(word);
    }
    void read(int& number) {
        using Range = std::numeric_limits<int>;
        number = static_cast<int>(scan_.integer(pointer_, Range::min(), Range::max()));
    }
    void read(ReadingId& id) { id = scan_.integer(pointer_, 0, LargestReadingId); } // 0 is none
    void read(Decimal& number) {
        const std::string text = scan_.atString() ? scan_.string() : std::string(scan_.skip());
        auto parsed = Decimal::parse(text);
        if (parsed)
            number = std::move(*parsed);
        else
            bad(text);
    }
    void read(FunctionChoice& choice) {
        std::string text;
        read(text);
        if (scan_.failed())
            return;
        const auto parsed = parseFunctionName(text);
        if (parsed)
            choice = *parsed;
        else
            bad(text);
    }
    template <Named E>
    void read(E& value) {
        std::string text;
        read(text);
        if (scan_.failed())
            return;
        const auto known = valueOf<E>(text);
        if (known)
            value = *known;
        else
            bad(text);
    }
    template <class T>
    void read(std::optional<T>& something) {
        something.reset();
        if (!scan_.takeNull())
            read(something.emplace());
    }
    template <class T>
    void read(std::vector<T>& several) {
        several.clear();
        if (!scan_.enterArray())
            return;
        while (scan_.nextItem()) {
            several.emplace_back();
            within(childPointer(pointer_, several.size() - 1), several.back());
        }
    }
    template <Part P>
    void read(P& part) {
        if (!scan_.enterObject())
            return;
        std::vector<std::string> seen;
        while (const auto key = scan_.nextKey()) {
            const std::string pointer = childPointer(pointer_, *key);
            if (std::find(seen.begin(), seen.end(), *key) != seen.end())
                scan_.failValue(pointer, *key);
            seen.push_back(*key);
            bool known = false;
            fields(part, [&](std::string_view name, auto& field) {
                if (known || name != *key)
                    return;
                known = true;
                within(pointer, field);
            });
            if (!known)
                keepUnknown(scan_, record_, pointer);
        }
    }

  private:
    void bad(std::string_view text) { scan_.failValue(pointer_, text); }
    template <class T>
    void within(std::string pointer, T& value) {
        std::swap(pointer, pointer_);
        read(value);
        std::swap(pointer, pointer_);
    }

    JsonScanner& scan_;
    Record& record_;
    std::string pointer_;
};

} // namespace

void writePart(JsonText& json, const Record& record, std::string_view name) {
    parts(record, [&](std::string_view known, const auto& part) {
        if (known == name)
            PartWriter(json, record, childPointer({}, name)).write(part);
    });
}

bool readPart(JsonScanner& scan, Record& record, std::string_view name) {
    bool found = false;
    parts(record, [&](std::string_view known, auto& part) {
        if (found || known != name)
            return;
        found = true;
        const std::string pointer = childPointer({}, name);
        forgetUnknown(record, pointer);
        part = {};
        PartReader(scan, record, pointer).read(part);
    });
    return found;
}

} // namespace spanwright
