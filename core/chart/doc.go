// Package chart turns a cell of a Report into figures: a drawing option, a
// caption, a text alternative, and a table of the numbers that are drawn. It
// computes no result; what it adds to the Report's numbers are bar ends such
// as D + k u_D, axis limits and the line through a grid family.
//
// An option is JSON for the drawing library that the page and the command
// share. It carries data and looks, never code: a custom mark names its draw
// function ("errorBar", "band"; an area may say how it is hatched) and an axis names how its numbers are printed
// ("decimals:2:0"); web/figures holds both tables. Numbers are finite; a value
// that is not there is null and leaves a gap. Texts may carry a subscript as
// "u_{val}", which the drawing side sets; captions and tables write u_val.
//
// All values are in the cell's unit, all u are standard uncertainties, bars
// and bands are k of them with the k of the cell's choices. The same cell
// gives the same bytes on every host.
//
// A figure of very many stations draws the extremes of every stretch and says
// so in its caption. The package cannot tell whether a figure is worth
// showing; it returns no figure only where there is nothing to draw.
package chart
