package main

import (
	"fmt"
	"io"
	"strings"
	"unicode"
	"unicode/utf8"

	"linewitness/report/format"
)

// typeable turns the typography of the pages into what a keyboard has, in the
// spelling of the design file: a result can then be searched for, compared
// by other tools and pasted into a design.
var typeable = strings.NewReplacer(
	format.Space+"×"+format.Space+"10"+string(format.Sup), "e",
	string(format.Sup), "^", string(format.Sub), "_", string(format.End), "",
	format.Minus, "-", format.Space, " ", format.Missing, "-",
	"Ω", "ohm", "µ", "u", "°", " deg", "λ", "wavelengths",
)

// inUnit is a value in the unit of a requirement.
func inUnit(v float64, unit string) string { return typeable.Replace(format.Quantity(v, unit)) }

// spread is an uncertainty in the unit of a requirement.
func spread(v float64, unit string) string { return typeable.Replace(format.Uncertainty(v, unit)) }

// inSI is a value in an SI unit, with an engineering prefix.
func inSI(v float64, unit string) string { return typeable.Replace(format.SI(v, unit)) }

func percent(fraction float64) string { return typeable.Replace(format.Percent(fraction)) }

func plainNumber(v float64) string { return typeable.Replace(format.Number(v)) }

func counted(n int, noun string) string { return typeable.Replace(format.Plural(int64(n), noun)) }

// whole is a number of things.
func whole(n int) string { return typeable.Replace(format.Count(int64(n))) }

// print prints what write writes. Texts of a file from outside may be in it, and these
// must not steer the terminal.
func (a *app) print(write func(io.Writer)) {
	var b strings.Builder
	write(&b)
	io.WriteString(a.stdout, printable(b.String()))
}

// printable is a text with a space for everything that a terminal does not print,
// but for ends of lines.
func printable(s string) string {
	return strings.Map(func(r rune) rune {
		if r == '\n' || unicode.IsPrint(r) {
			return r
		}
		return ' '
	}, s)
}

// writeTable writes rows of cells with two spaces before each row and between
// columns, each column as wide as its widest cell, and no space at the end of
// a line.
func writeTable(w io.Writer, rows [][]string) {
	var widths []int
	for _, row := range rows {
		for i, cell := range row {
			if i == len(widths) {
				widths = append(widths, 0)
			}
			widths[i] = max(widths[i], utf8.RuneCountInString(cell))
		}
	}
	for _, row := range rows {
		var line strings.Builder
		for i, cell := range row {
			line.WriteString("  " + cell + strings.Repeat(" ", widths[i]-utf8.RuneCountInString(cell)))
		}
		fmt.Fprintln(w, strings.TrimRight(line.String(), " "))
	}
}
