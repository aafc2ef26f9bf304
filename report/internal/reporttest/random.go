package reporttest

import (
	"fmt"

	"pgregory.net/rapid"
)

// Random draws a network: a tree of sections from the source, some sections
// that close loops, loads at some junctions, with names of any length.
func Random(t *rapid.T, most int) Network {
	n := Network{Frequency: 1e6 * rapid.Float64Range(0.1, 900).Draw(t, "MHz"), EMF: rapid.Float64Range(1e-3, 1e5).Draw(t, "emf"), Source: 50}
	junctions := []string{name(t, "source", 0)}
	n.At = junctions[0]
	for i := range rapid.IntRange(1, most).Draw(t, "sections") {
		s := Section{
			Name: name(t, "section", i), From: rapid.SampledFrom(junctions).Draw(t, "from"),
			Length: rapid.Float64Range(1e-3, 20).Draw(t, "wavelengths") * 2e8 / n.Frequency,
			Z0:     rapid.Float64Range(5, 600).Draw(t, "z0"), VF: rapid.Float64Range(0.4, 1).Draw(t, "vf"),
		}
		s.DB = rapid.Float64Range(0.01, 1).Draw(t, "loss") / s.Length
		if i > 0 && rapid.IntRange(0, 4).Draw(t, "closes") == 0 {
			s.To = rapid.SampledFrom(junctions).Draw(t, "to")
		} else {
			s.To = name(t, "junction", len(junctions))
			junctions = append(junctions, s.To)
		}
		if s.To == s.From {
			s.To = name(t, "junction", len(junctions))
			junctions = append(junctions, s.To)
		}
		n.Sections = append(n.Sections, s)
	}
	for i, j := range junctions[1:] {
		if rapid.Bool().Draw(t, "loaded") {
			n.Loads = append(n.Loads, load(t, i, j))
		}
	}
	for i := range rapid.IntRange(0, min(len(junctions)-1, 3)).Draw(t, "bridges") {
		n.Bridges = append(n.Bridges, bridge(t, i, junctions))
	}
	return n
}

// bridge draws an element between two junctions: a resistor, a combination or
// a transformer.
func bridge(t *rapid.T, i int, junctions []string) Load {
	l := Load{Name: name(t, "bridge", i), R: rapid.Float64Range(0.1, 1e4).Draw(t, "r")}
	a := rapid.IntRange(0, len(junctions)-2).Draw(t, "a")
	b := rapid.IntRange(a+1, len(junctions)-1).Draw(t, "b")
	if rapid.Bool().Draw(t, "turned") {
		a, b = b, a
	}
	l.At, l.To = junctions[a], junctions[b]
	switch rapid.IntRange(0, 2).Draw(t, "kind") {
	case 0:
		l.Ratio, l.Given = rapid.Float64Range(0.1, 10).Draw(t, "ratio"), rapid.SampledFrom([]string{"1:4", "2.5 : 1", "49:1"}).Draw(t, "turns")
	case 1:
		l.Given, l.As = "(47 nH with Q 180 || 56 pF with Q 1000), 48 nH with Q 180", "combination of 3"
	}
	return l
}

func load(t *rapid.T, i int, at string) Load {
	l := Load{Name: name(t, "load", i), At: at, R: rapid.Float64Range(0.1, 1e4).Draw(t, "r")}
	switch rapid.IntRange(0, 4).Draw(t, "kind") {
	case 0:
		l.Open = true
	case 1:
		l.Short = true
	case 2:
		l.L = rapid.Float64Range(1e-9, 1e-5).Draw(t, "l")
	case 3:
		l.C = rapid.Float64Range(1e-12, 1e-8).Draw(t, "c")
	}
	return l
}

// name makes a name that no other thing of its kind has.
func name(t *rapid.T, kind string, i int) string {
	pad := rapid.SampledFrom([]string{"", "", "_to_the_upper_mast_platform_and_beyond", "_Ωλ", "_W"}).Draw(t, "pad")
	return fmt.Sprintf("%s_%d%s", kind, i, pad)
}
