//! painter
