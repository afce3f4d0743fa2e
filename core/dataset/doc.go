// Package dataset reads described data: a table of reference figures and the
// manifest that says what they are.
//
// An entry is two files of one folder: name.json, the manifest, and the table
// it names, CSV with the columns curve, x, value, u, flag, remark. Numbers keep
// their printed digits beside their value; x and value are in the units that
// the manifest states, u is an uncertainty whose coverage the manifest states
// (blank: none given). A row that is flagged as misprint or doubtful is shown
// and not used.
//
// Refused, each by a typed error: a manifest with an unknown or blank field,
// an unknown kind, reach or unit; a table whose SHA-256 is not the recorded
// one; a row that is no row of the form. The package cannot tell whether a
// number was transcribed rightly: tests compare the shelf with its sources.
package dataset
