// Package tablefile reads tables of numbers from text: delimited files,
// whitespace tables and tables in zones.
//
// Bytes go in, a File comes out: tables of columns, in file order, values as
// written and never converted, missing values NaN, units as the file states
// them. Everything that was guessed, passed over or held back is a notice of
// the file; no row vanishes without one. A file that cannot be read has a
// stop notice and no table.
//
// It refuses what is not text, a quoted field that never closes, and a column
// written with both decimal signs. Zones in an order it does not read are left
// out, each with a stop notice of its own.
//
// It cannot tell what a column means, whether a stated unit is right, or
// whether 0,125 was meant as a decimal or as thousands: that is asked.
package tablefile
