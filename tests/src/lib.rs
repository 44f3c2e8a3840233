//! Whole designs in, every output compared.
