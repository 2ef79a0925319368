// Package plot draws the charts of a note with gonum.org/v1/plot: the checks at
// a glance and the course of the iteration. What the library draws is recorded
// as a drawing.Scene, so that one chart serves the PDF and the web page as
// lines, areas and words.
package plot
