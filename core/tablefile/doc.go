// Package tablefile reads tables of numbers: from text with separators, with
// blanks, in fixed widths and in zones, from workbooks (xlsx) and from JSON
// profiles.
//
// Bytes go in, a File comes out: tables of columns, in file order, values as
// written and never converted, missing values NaN, units as the file states
// them, and what the file states beside its tables. Everything that was
// guessed, passed over or held back is a notice of the file; no row vanishes
// without one. A file that cannot be read has a stop notice and no table. What
// a person answered to the questions of the reader comes in as Options.
//
// It refuses what is not text, workbook or profile, a quoted field that never
// closes, a column written with both decimal signs, and what asks for more
// memory than a table is worth. Zones in an order it does not read, tables
// with a date among their numbers and ranges with a formula without a stored
// result are left out, each with a stop notice of its own.
//
// It cannot tell what a column means, whether a stated unit is right, whether
// 0,125 was meant as a decimal or as thousands, or whether hidden rows belong
// to the data: that is asked.
//
// Of a workbook, line numbers are rows of the sheet; a line break within a
// cell is read as a blank.
package tablefile
