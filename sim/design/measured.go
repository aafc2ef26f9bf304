package design

import (
	"fmt"
	"math"
	"math/cmplx"

	"linewitness/sim/oneport"
)

// mostPoints bounds the tables that are typed into a design.
const mostPoints = 500

// fileImpedance reads the impedance of a one-port file at the design frequency.
func (f *fields) fileImpedance(key string) (Impedance, []string) {
	n := f.scalar(key)
	if n == nil {
		return Impedance{}, nil
	}
	table, fault := f.w.folder.onePort(n.text)
	if fault != nil {
		f.w.fault(n, f.name(key), fault)
		return Impedance{}, nil
	}
	return f.tableAt(key, n, table, n.text)
}

// tableImpedance reads a list of impedances and takes that at the design
// frequency.
func (f *fields) tableImpedance(key string) (Impedance, []string) {
	n := f.node(key)
	if n == nil {
		return Impedance{}, nil
	}
	points, ok := f.points(key, n)
	if !ok {
		return Impedance{}, nil
	}
	table, err := oneport.FromImpedances(points)
	if err != nil {
		f.w.fault(n, f.name(key), newFault(noHint, "%s", rawText(err.Error())))
		return Impedance{}, nil
	}
	return f.tableAt(key, n, table, "the table")
}

// points reads the rows of a table; ok is false if one is not good.
func (f *fields) points(key string, n *node) (points []oneport.Impedance, ok bool) {
	rows, ok := f.rows(key, n, impedancePointTable, mostPoints)
	for _, row := range rows {
		at, good := row.value("at", frequency, positive)
		z := row.scalar("impedance")
		if !good || z == nil {
			ok = false
			continue
		}
		value, fault := parseComplex(z.text, resistance, f.w.design.Convention)
		if fault != nil {
			f.w.fault(z, row.name("impedance"), fault)
			ok = false
		}
		points = append(points, oneport.Impedance{F: at.SI, Z: value})
	}
	return points, ok
}

// tableAt is the impedance of a one-port at the design frequency.
func (f *fields) tableAt(key string, n *node, table *oneport.Table, from string) (Impedance, []string) {
	s := f.w.design.Source.Frequency
	if s.SI == 0 {
		return Impedance{}, nil // the frequency has been told of
	}
	z, err := table.At(s.SI)
	if err != nil {
		f.w.fault(n, f.name(key), newFault(say("the design frequency must be in it"), "%s", rawText(err.Error())))
		return Impedance{}, nil
	}
	text := ohms(z)
	out := Impedance{Pos: n.pos, Kind: Complex, Z: z, From: from, Text: fmt.Sprintf("%s, from %s at %s", text, from, s.Text)}
	switch {
	case cmplx.IsInf(z):
		out.Kind, out.Z, out.Text = Open, 0, fmt.Sprintf("open, from %s at %s", from, s.Text)
	case real(z) < 0:
		f.w.problem(n.pos, say("check its calibration and its signs"), "%s has a negative resistance at the design frequency: %s", f.name(key), text)
	}
	return out, table.Warnings(s.SI)
}

// ohms prints an impedance as a design file writes it.
func ohms(z complex128) string {
	sign := "+"
	if imag(z) < 0 {
		sign = "-"
	}
	return fmt.Sprintf("%.6g %s j%.6g ohm", real(z), sign, math.Abs(imag(z)))
}
