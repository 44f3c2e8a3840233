//! The command search: all commands, found by a part of their name.

use egui::{Key, ScrollArea, TextEdit, Ui};

use super::{command::Command, panels::Cx, safe, widgets::Widgets};

/// Draws the search while it is open.
pub(super) fn search_ui(cx: Cx<'_>, ui: &Ui, widgets: &mut Widgets) {
    if cx.state.search.is_none() {
        widgets.search.clear();
        return;
    }
    let modal = super::prompts::question(ui, "search").show(ui.ctx(), |ui| {
        ui.set_width(420.0);
        let field = TextEdit::singleline(&mut widgets.search)
            .hint_text("Name of a command")
            .desired_width(f32::INFINITY);
        let field = ui.add(field).accessible_name("Name of a command");
        field.request_focus();
        let found = found(&widgets.search, safe::openings(cx));
        ScrollArea::vertical()
            .max_height(340.0)
            .auto_shrink([false, true])
            .show(ui, |ui| {
                for (name, command) in &found {
                    row(cx, ui, name, command);
                }
                if found.is_empty() {
                    ui.weak("No command has that in its name.");
                }
            });
        if ui.input(|i| i.key_pressed(Key::Enter))
            && let Some((_, first)) = found.into_iter().next()
        {
            cx.tx.send(Command::Dismiss);
            cx.tx.send(first);
        }
    });
    if modal.should_close() {
        cx.tx.send(Command::Dismiss);
    }
}

fn row(cx: Cx<'_>, ui: &mut Ui, name: &str, command: &Command) {
    let words = command.words();
    let mut button = egui::Button::new(name).min_size(egui::vec2(ui.available_width(), 0.0));
    if let Some(keys) = command.shortcut() {
        button = button.shortcut_text(ui.ctx().format_shortcut(&keys));
    }
    if ui.add(button).on_hover_text(words.hint).clicked() {
        cx.tx.send(Command::Dismiss);
        cx.tx.send(command.clone());
    }
}

/// Commands whose name has all the typed words in it, in the order of the menus; then those that have names of their own.
fn found(typed: &str, more: Vec<(String, Command)>) -> Vec<(String, Command)> {
    let typed = typed.to_lowercase();
    let has_all = |name: &str| typed.split_whitespace().all(|word| name.contains(word));
    let listed = Command::listed().into_iter().map(|c| (c.words().name.to_owned(), c));
    listed
        .chain(more)
        .filter(|(name, c)| !matches!(c, Command::Find) && has_all(&name.to_lowercase()))
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_part_of_the_name_finds_a_command() {
        let names: Vec<String> = found("add cour", Vec::new())
            .into_iter()
            .map(|(name, _)| name)
            .collect();
        assert_eq!(names, ["Add a course"]);
        assert!(found("no such thing", Vec::new()).is_empty());
    }
}
