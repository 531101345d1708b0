// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/job/ConditionsCard.h"

#include "ui/commands/FieldForm.h"
#include "ui/look/Look.h"

#include <QGridLayout>
#include <QLabel>
#include <QToolButton>
#include <QVBoxLayout>

namespace spanwright {

namespace {

QToolButton* wordButton(const QString& name, const QString& text) {
    auto* button = new QToolButton;
    button->setObjectName(name);
    button->setText(text);
    button->setProperty("link", true);
    button->setFocusPolicy(Qt::StrongFocus);
    return button;
}

template <class T>
auto access(std::size_t index, T Condition::*field) {
    return [index, field, spare = std::make_shared<Condition>()](Conditions& all) -> T& {
        return (index < all.influences.size() ? all.influences[index] : *spare).*field;
    };
}

auto accessQuantity(std::size_t index, std::string Quantity::*field) {
    return [quantity = access(index, &Condition::quantity), field](Conditions& all) -> std::string& { return quantity(all).*field; };
}

} // namespace

ConditionsCard::ConditionsCard(Workbench& bench, QWidget* parent) : Card(tr("Conditions"), parent), bench_(bench), rows_(new QVBoxLayout) {
    QToolButton* usual = wordButton(QStringLiteral("conditions.usual"), tr("Add the usual three"));
    QToolButton* one = wordButton(QStringLiteral("conditions.add"), tr("Add a quantity"));
    addHeadWidget(usual);
    addHeadWidget(one);
    connect(usual, &QToolButton::clicked, this, [this] {
        add({{tr("temperature").toStdString(), "\u00b0C"}, {tr("relative humidity").toStdString(), "%RH"}, {tr("air pressure").toStdString(), "hPa"}});
    });
    connect(one, &QToolButton::clicked, this, [this] { add({Quantity{}}); });
    rows_->setSpacing(space::half);
    body()->addLayout(rows_);
    body()->addWidget(longFieldBox(bench, QStringLiteral("conditions.remarks"), tr("Orientation, medium, supply, load"),
                                   textBinding(&Record::conditions, tr("remarks on conditions"),
                                               [](Conditions& c) -> std::string& { return c.remarks; })));
    connect(&bench, &Workbench::recordChanged, this, &ConditionsCard::show);
    show();
}

void ConditionsCard::add(const std::vector<Quantity>& quantities) {
    bench_.perform(changePart(bench_.record(), &Record::conditions, tr("add conditions"), [&](Conditions& c) {
        for (const Quantity& quantity : quantities)
            c.influences.push_back({.quantity = quantity, .start = {}, .end = {}, .low = {}, .high = {}});
    }));
    if (auto* line = findChild<FieldLine*>(QStringLiteral("conditions.influences.%1.%2")
                                               .arg(bench_.record().conditions.influences.size() - quantities.size())
                                               .arg(quantities.size() == 1 ? QLatin1String("quantity.name") : QLatin1String("start"))))
        line->setFocus();
}

void ConditionsCard::show() {
    const std::size_t count = bench_.record().conditions.influences.size();
    if (count == shown_)
        return;
    shown_ = count;
    while (QLayoutItem* item = rows_->takeAt(0)) {
        // A button in the row may be what asked for this.
        if (QWidget* widget = item->widget()) {
            widget->hide();
            widget->disconnect();
            for (QObject* child : widget->findChildren<QObject*>()) {
                child->setObjectName({});
                QObject::disconnect(&bench_, nullptr, child, nullptr);
            }
            widget->setObjectName({});
            widget->deleteLater();
        }
        delete item;
    }
    auto* table = new QWidget;
    table->setObjectName(QStringLiteral("conditions.influences"));
    auto* grid = new QGridLayout(table);
    grid->setContentsMargins(0, 0, 0, 0);
    grid->setHorizontalSpacing(space::half);
    grid->setVerticalSpacing(space::half);
    const QString heads[] = {tr("quantity"), tr("unit"), tr("start"), tr("end"), tr("not below"), tr("not above"), QString()};
    const int stretch[] = {5, 2, 2, 2, 2, 2, 0};
    for (int column = 0; column < 7; ++column) {
        auto* head = new QLabel(count > 0 ? heads[column] : QString());
        head->setFont(textFont(TextRole::Small));
        head->setForegroundRole(inkRole::quiet);
        grid->addWidget(head, 0, column);
        grid->setColumnStretch(column, stretch[column]);
    }
    for (std::size_t i = 0; i < count; ++i) {
        const QString path = QStringLiteral("conditions.influences.%1.").arg(i);
        const auto put = [&](int column, FieldLine* line) {
            line->setMinimumWidth(44);
            auto* cell = new QVBoxLayout;
            cell->setSpacing(0);
            cell->addWidget(line);
            auto* refusal = new QLabel;
            refusal->setFont(textFont(TextRole::Small));
            refusal->setForegroundRole(inkRole::warning);
            refusal->setWordWrap(true);
            refusal->hide();
            connect(line, &FieldLine::refusalChanged, refusal, [refusal](const QString& sentence) {
                refusal->setText(sentence);
                refusal->setVisible(!sentence.isEmpty());
            });
            cell->addWidget(refusal);
            grid->addLayout(cell, static_cast<int>(i) + 1, column);
        };
        const auto number = [&](int column, const char* name, std::optional<Decimal> Condition::*field) {
            put(column, new FieldLine(bench_, path + QLatin1String(name), heads[column],
                                      numberBinding(&Record::conditions, tr("conditions"), access(i, field))));
        };
        put(0, new FieldLine(bench_, path + QStringLiteral("quantity.name"), heads[0],
                             textBinding(&Record::conditions, tr("conditions"), accessQuantity(i, &Quantity::name))));
        put(1, new FieldLine(bench_, path + QStringLiteral("quantity.unit"), heads[1],
                             textBinding(&Record::conditions, tr("conditions"), accessQuantity(i, &Quantity::unit))));
        number(2, "start", &Condition::start);
        number(3, "end", &Condition::end);
        number(4, "low", &Condition::low);
        number(5, "high", &Condition::high);
        QToolButton* away = wordButton(path + QStringLiteral("remove"), QStringLiteral("\u00d7"));
        away->setAccessibleName(tr("Remove this quantity"));
        away->setToolTip(tr("Remove this quantity"));
        connect(away, &QToolButton::clicked, this, [this, i] {
            bench_.perform(changePart(bench_.record(), &Record::conditions, tr("remove a condition"), [&](Conditions& c) {
                c.influences.erase(c.influences.begin() + static_cast<std::ptrdiff_t>(i));
            }));
        });
        grid->addWidget(away, static_cast<int>(i) + 1, 6);
    }
    rows_->addWidget(table);
    table->show();
}

} // namespace spanwright
