// Package memo turns a Report into the written memo: one document tree, and
// the tree into HTML for print, Markdown, and a CSV of the stations.
//
// Input is the Report with the statements and figures that other packages made
// of it. Nothing is computed here: numbers are picked, counted, rounded for
// the reader, and printed with the ten digits of the report beside them and the
// path they stand at. What the study does not hold is said to be absent.
//
// Texts of users and files are escaped by the renderers; figures are copied
// element by element and lose whatever is not drawing. The package cannot tell
// whether a statement handed over fits the numbers of its cell.
package memo
