// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/certificate/SignOffCard.h"

#include "core/record/Fields.h"
#include "ui/commands/PartCommand.h"
#include "ui/look/Look.h"
#include "ui/words/Words.h"

#include <QDate>
#include <QHBoxLayout>
#include <QLabel>
#include <QLineEdit>
#include <QStyle>
#include <QToolTip>
#include <QVBoxLayout>

#include <algorithm>

namespace spanwright {

namespace {

constexpr SignOffRole roles[] = {SignOffRole::Performed, SignOffRole::Checked, SignOffRole::Authorised};

SignOff signOffOf(const Record& record, SignOffRole role) {
    for (const SignOff& one : record.signOffs)
        if (one.role == role)
            return one;
    SignOff none;
    none.role = role;
    return none;
}

bool goodDate(const QString& text) {
    return text.isEmpty() || (text.size() == 10 && QDate::fromString(text, Qt::ISODate).isValid());
}

} // namespace

SignOffCard::SignOffCard(Workbench& workbench, QWidget* parent) : Card(tr("Signing off"), parent), workbench_(workbench) {
    for (const SignOffRole role : roles)
        roles_[static_cast<std::size_t>(role)] = addRole(role);
    connect(&workbench_, &Workbench::recordChanged, this, &SignOffCard::refresh);
    refresh();
}

QLineEdit* SignOffCard::addEditor(const QString& id, const QString& name, const QString& placeholder) {
    auto* edit = new QLineEdit;
    edit->setObjectName(id);
    edit->setAccessibleName(name);
    edit->setPlaceholderText(placeholder);
    return edit;
}

SignOffCard::Editors SignOffCard::addRole(SignOffRole role) {
    const QString id = QStringLiteral("signoffs.") + QString::fromUtf8(nameOf(role).data(), static_cast<qsizetype>(nameOf(role).size()));
    QString word = signOffText(role);
    word.replace(0, 1, word.left(1).toUpper());
    auto* label = new QLabel(word);
    label->setFont(textFont(TextRole::Small));
    label->setForegroundRole(inkRole::quiet);
    const Editors editors{addEditor(id, tr("%1: name").arg(word), tr("name")),
                          addEditor(id + QStringLiteral(".position"), tr("%1: position").arg(word), tr("position")),
                          addEditor(id + QStringLiteral(".date"), tr("%1: date as 2026-11-30").arg(word), tr("YYYY-MM-DD"))};
    label->setBuddy(editors.name);
    auto* line = new QHBoxLayout;
    line->setSpacing(space::half);
    line->addWidget(editors.name, 3);
    line->addWidget(editors.position, 4);
    line->addWidget(editors.date, 3);
    body()->addWidget(label);
    body()->addLayout(line);
    for (QLineEdit* edit : {editors.name, editors.position, editors.date})
        connect(edit, &QLineEdit::editingFinished, this, [this, role] { commit(role); });
    return editors;
}

void SignOffCard::refresh() {
    for (const SignOffRole role : roles) {
        const SignOff one = signOffOf(workbench_.record(), role);
        const Editors& editors = roles_[static_cast<std::size_t>(role)];
        const std::pair<QLineEdit*, const std::string*> all[] = {{editors.name, &one.name}, {editors.position, &one.position}, {editors.date, &one.date}};
        for (const auto& [edit, text] : all) {
            // What is being typed, or was refused, stays.
            if (!(edit->hasFocus() && edit->isModified()) && !edit->property("refused").toBool())
                edit->setText(QString::fromStdString(*text));
            edit->setReadOnly(workbench_.readOnly());
        }
    }
}

void SignOffCard::commit(SignOffRole role) {
    const Editors& editors = roles_[static_cast<std::size_t>(role)];
    const QString date = editors.date->text().trimmed();
    const bool good = goodDate(date);
    editors.date->setProperty("refused", !good);
    editors.date->style()->unpolish(editors.date);
    editors.date->style()->polish(editors.date);
    const QString why = good ? QString() : tr("A date is written as 2026-11-30.");
    editors.date->setToolTip(why);
    if (!good && isVisible())
        QToolTip::showText(editors.date->mapToGlobal(editors.date->rect().bottomLeft()), why, editors.date);
    SignOff one = signOffOf(workbench_.record(), role);
    one.name = editors.name->text().trimmed().toStdString();
    one.position = editors.position->text().trimmed().toStdString();
    if (good)
        one.date = date.toStdString();
    workbench_.perform(changePart(workbench_.record(), &Record::signOffs, tr("sign off"), [&](std::vector<SignOff>& all) {
        all.erase(std::remove_if(all.begin(), all.end(), [&](const SignOff& other) { return other.role == role; }), all.end());
        if (!one.name.empty() || !one.position.empty() || !one.date.empty())
            all.push_back(one);
        std::stable_sort(all.begin(), all.end(), [](const SignOff& a, const SignOff& b) { return a.role < b.role; });
    }));
    for (QLineEdit* edit : {editors.name, editors.position, editors.date})
        edit->setModified(false);
}

} // namespace spanwright
