// Package sentence writes the careful sentence of a cell: what was compared,
// what is missing, what can be said and on what it rests.
//
// Input is one cell of a report; output is phrases, in order, whose texts
// joined are the statement. Every number has its origin as a target, every
// missing item is a blank of its own, every guess keeps its mark.
//
// It refuses to state a result while the cell is withheld, and it never uses
// a word that says more than the numbers: no comparison has a pass.
package sentence
