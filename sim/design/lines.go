package design

import (
	"fmt"
	"math"
	"strings"

	"linewitness/sim/line"
)

// lightTolerance lets r, l, g, c that were computed for the speed of light
// pass in spite of rounding.
const lightTolerance = 1e-9

// walkLines reads the kinds of line. Their constants need the frequency.
func (w *walker) walkLines(items []item) {
	w.lines, w.lineNames = map[string]*Line{}, names(items)
	for _, i := range items {
		if i.fields == nil {
			continue
		}
		l := Line{Pos: i.name.pos, Name: i.name.text}
		if _, ok := i.fields.at["z0"]; ok {
			w.nominalLine(i.fields, &l)
		} else {
			w.constantLine(i.fields, &l)
		}
		l.Base, l.Model = l.Constants, Constant
		w.design.Lines = append(w.design.Lines, l)
		w.lines[l.Name] = &l
	}
}

func (w *walker) nominalLine(f *fields, l *Line) {
	z0, _ := f.value("z0", resistance, positive)
	vf, n, ok := f.quantity("velocity_factor", fraction)
	if !ok {
		return
	}
	if vf.value <= 0 || vf.value > 1 {
		w.problem(n.pos, say("it is the phase velocity over that of light, such as 0.66"),
			"%s must be above 0 and at most 1, not %q", f.name("velocity_factor"), n.text)
		return
	}
	l.Nominal = &Nominal{Z0: z0.SI, VelocityFactor: vf.value}
	l.Text = fmt.Sprintf("z0 %s, velocity factor %s", z0.Text, n.text)
	if loss := f.node("loss"); loss != nil {
		w.walkLoss(w.fields(loss, f.at["loss"].key.pos, "the loss of "+f.what, lossTable), l)
	}
	if freq := w.design.Source.Frequency.SI; freq > 0 && z0.SI > 0 {
		l.Constants = l.Nominal.At(freq)
	}
}

func (w *walker) walkLoss(f *fields, l *Line) {
	if f == nil {
		return
	}
	at, ok1 := f.value("at", frequency, positive)
	attenuation, ok2 := f.value("attenuation", fading, notNegative)
	if !ok1 || !ok2 {
		return
	}
	l.Nominal.LossAt, l.Nominal.Attenuation = at.SI, attenuation.SI
	l.Text += fmt.Sprintf(", %s at %s", attenuation.Text, at.Text)
	share, n, ok := f.quantity("dielectric_share", fraction)
	if !ok {
		return
	}
	if share.value < 0 || share.value > 1 {
		w.problem(n.pos, say("it is the part of the loss that is in the dielectric"), "%s must be from 0 to 1, not %q", f.name("dielectric_share"), n.text)
	}
	l.Nominal.DielectricShare = share.value
	l.Text += fmt.Sprintf(", dielectric share %s", n.text)
}

func (w *walker) constantLine(f *fields, l *Line) {
	r, _ := f.value("r", seriesR, notNegative)
	ind, _ := f.value("l", seriesL, positive)
	g, _ := f.value("g", shuntG, notNegative)
	c, _ := f.value("c", shuntC, positive)
	l.Constants = line.Constants{R: r.SI, L: ind.SI, G: g.SI, C: c.SI}
	var text []string
	for i, v := range []Value{r, ind, g, c} {
		if v.Text != "" {
			text = append(text, "rlgc"[i:i+1]+" "+v.Text)
		}
	}
	l.Text = strings.Join(text, ", ")
	if ind.SI <= 0 || c.SI <= 0 {
		return
	}
	if v := 1 / (math.Sqrt(ind.SI) * math.Sqrt(c.SI)); v > line.C0*(1+lightTolerance) {
		w.problem(ind.Pos, say("l times c is at least 1.1127e-17 s2/m2; check the unit prefixes and lengths"),
			"%s is faster than light: 1/sqrt(l c) is %.4g times c", f.what, v/line.C0)
	}
}
