package sim

import (
	"math"
	"slices"

	"linewitness/fdtd"
	"linewitness/sim/design"
	"linewitness/sim/line"
	"linewitness/sim/record"
)

// model echoes the network in every equivalent form.
func (s *solved) model() record.Model {
	d, net := s.design, s.net
	out := record.Model{Frequency: net.Frequency, Junctions: d.Junctions, Lines: s.lines()}
	for k, sec := range net.Sections {
		at := sec.At(net.Omega())
		g := at.Propagation(net.Omega())
		w := imag(g) * sec.Length / (2 * pi)
		out.Sections = append(out.Sections, record.ModelSection{
			Name: sec.Name, Line: d.Sections[k].Line, From: d.Sections[k].From, To: d.Sections[k].To,
			Given: d.Sections[k].Length.Text, Length: sec.Length,
			Wavelengths: w, Degrees: 360 * w, Delay: sec.Delay(),
			LossDB: real(g) * sec.Length * line.NeperDB,
			Z0:     at.Impedance(net.Omega()), VelocityFactor: at.PhaseVelocity(net.Omega()) / line.C0,
			R: at.R, L: at.L, G: at.G, C: at.C,
		})
	}
	for p := range net.Parts {
		if p < len(d.Loads) {
			out.Loads = append(out.Loads, part(net, p, d.Loads[p]))
		} else {
			out.Elements = append(out.Elements, part(net, p, d.Elements[p-len(d.Loads)]))
		}
	}
	out.Source = s.modelSource()
	return out
}

// lines echoes the kinds of line that sections are made of.
func (s *solved) lines() []record.ModelLine {
	var out []record.ModelLine
	for _, l := range s.design.Lines {
		if !slices.ContainsFunc(s.design.Sections, func(sec design.Section) bool { return sec.Line == l.Name }) {
			continue
		}
		m := record.ModelLine{Name: l.Name, Text: l.Text, Model: string(l.Model), FieldPerVolt: l.FieldPerVolt}
		m.SeriesResidual, m.ShuntResidual = fdtd.FormResidual(l.Dispersion, s.net.Omega())
		for _, p := range l.Pedigree {
			m.Pedigree = append(m.Pedigree, record.Pedigree{What: p.What, Text: p.Text, Kind: string(p.Kind), Note: p.Note})
		}
		for _, f := range l.Fit {
			m.Fit = append(m.Fit, record.FitPoint{
				Frequency: f.Frequency, Text: f.Text,
				Given: f.Given * line.NeperDB, Fitted: f.Fitted * line.NeperDB,
			})
		}
		out = append(out, m)
	}
	return out
}

func (s *solved) modelSource() record.ModelSource {
	d, src := s.design.Source, s.net.Source
	out := record.ModelSource{
		At: d.At, Given: d.EMF.Text, EMF: src.EMF,
		R: src.R, L: src.L, C: src.C, Impedance: src.Impedance(s.net.Omega()),
		Start: d.Start.Text,
	}
	if d.Available != nil {
		out.Given = d.Available.Text + " available"
	}
	if a := src.Available(); !math.IsInf(a, 1) {
		out.Available = a
	}
	if d.Stop != nil {
		out.Stop = d.Stop.Text
	}
	return out
}
