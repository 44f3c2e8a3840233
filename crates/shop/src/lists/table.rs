//! Writing a list.

use core::fmt::Display;

use crate::text::{DEG_DECIMALS, M2_DECIMALS, MM_DECIMALS, MM2_PER_M2, count, trimmed};

/// A list that is being written, cell by cell.
pub(super) struct Table {
    writer: csv::Writer<Vec<u8>>,
    header: Vec<String>,
    row: Vec<String>,
}

impl Table {
    /// A list with these columns.
    pub(super) fn new(header: Vec<String>) -> Self {
        let writer = csv::WriterBuilder::new()
            .terminator(csv::Terminator::CRLF)
            .from_writer(Vec::new());
        let mut table = Self {
            writer,
            row: header.clone(),
            header,
        };
        table.end_row();
        table
    }

    /// A mark, a word, or several with spaces between. All of them start with a letter.
    pub(super) fn text(&mut self, text: impl Display) {
        self.row.push(text.to_string());
    }

    /// A cell with nothing in it.
    pub(super) fn empty(&mut self) {
        self.row.push(String::new());
    }

    pub(super) fn count(&mut self, n: usize) {
        self.row.push(count(n));
    }

    pub(super) fn whole(&mut self, n: i32) {
        self.row.push(trimmed(f64::from(n), 0));
    }

    pub(super) fn mm(&mut self, mm: f64) {
        self.row.push(trimmed(mm, MM_DECIMALS));
    }

    pub(super) fn deg(&mut self, degrees: f64) {
        self.row.push(trimmed(degrees, DEG_DECIMALS));
    }

    pub(super) fn maybe_deg(&mut self, degrees: Option<f64>) {
        match degrees {
            Some(degrees) => self.deg(degrees),
            None => self.empty(),
        }
    }

    pub(super) fn m2(&mut self, mm2: f64) {
        self.row.push(trimmed(mm2 / MM2_PER_M2, M2_DECIMALS));
    }

    /// Leaves cells empty up to a column.
    pub(super) fn pad_to(&mut self, column: usize) {
        self.row.resize(column, String::new());
    }

    /// Ends the row; what is missing to the columns stays empty.
    pub(super) fn end_row(&mut self) {
        self.row.resize(self.header.len(), String::new());
        // Writing to memory cannot fail, and all rows have as many cells as the header.
        let _ = self.writer.write_record(&self.row);
        self.row.clear();
    }

    /// The whole list.
    pub(super) fn finish(self) -> String {
        // Only text went in; into_inner flushes to memory, which cannot fail.
        self.writer
            .into_inner()
            .ok()
            .and_then(|bytes| String::from_utf8(bytes).ok())
            .unwrap_or_default()
    }
}

/// Marks or words one after the other with spaces between.
pub(super) fn joined<T: Display>(items: impl Iterator<Item = T>) -> String {
    let mut text = String::new();
    for item in items {
        if !text.is_empty() {
            text.push(' ');
        }
        text.push_str(&item.to_string());
    }
    text
}
