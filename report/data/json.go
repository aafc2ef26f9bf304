package data

import (
	"fmt"

	"linewitness/sim/record"
)

// JSON returns the record as a JSON document of format record.Format, indented
// and with a final newline. The same record gives the same bytes.
//
// It fails if two cases, or two lines, sections, loads or junctions of a case,
// have the same name or none, because then one of them would be lost to a reader.
func JSON(r *record.Record) ([]byte, error) {
	var cases named
	for i := range r.Cases {
		c, err := caseObject(&r.Cases[i])
		if err != nil {
			return nil, fmt.Errorf("data: case %q: %w", r.Cases[i].Name, err)
		}
		cases.add(r.Cases[i].Name, c)
	}
	all, err := cases.object("case")
	if err != nil {
		return nil, fmt.Errorf("data: %w", err)
	}
	return render(object{
		{"format", record.Format},
		{"tool", object{{"version", r.Tool.Version}, {"go", r.Tool.Go}}},
		{"design", designObject(r.Design)},
		{"verdict", string(r.Verdict)},
		{"cases", all},
		{"matrix", matrixObject(r.Matrix)},
	}), nil
}

func designObject(d record.Design) object {
	return object{
		{"number", d.Number},
		{"revision", d.Revision},
		{"title", d.Title},
		{"date", d.Date},
		{"date_from", d.DateFrom},
		{"history", historyList(d.History)},
		{"sha256", d.SHA256},
		{"file", d.File},
		{"convention", d.Convention},
		{"agreement_limit", d.Agreement},
		{"settle_tolerance", d.Tolerance},
		{"max_periods", d.MaxPeriods},
		{"fsv_choices", stringList(d.FSVChoices)},
	}
}

func caseObject(c *record.Case) (object, error) {
	phasor, err := steadyObject(c.Phasor)
	if err != nil {
		return nil, fmt.Errorf("phasor: %w", err)
	}
	fdtd, err := steadyObject(c.FDTD)
	if err != nil {
		return nil, fmt.Errorf("fdtd: %w", err)
	}
	stress, err := stressObject(c.Stress)
	if err != nil {
		return nil, fmt.Errorf("stress: %w", err)
	}
	agreement, err := agreementObject(c.Agreement)
	if err != nil {
		return nil, fmt.Errorf("agreement: %w", err)
	}
	grid, err := gridObject(c.Grid)
	if err != nil {
		return nil, fmt.Errorf("grid: %w", err)
	}
	lines, err := linesObject(c.Model.Lines)
	if err != nil {
		return nil, err
	}
	settling, err := settlingObject(c.Settling)
	if err != nil {
		return nil, fmt.Errorf("settling: %w", err)
	}
	power, err := powerObject(c.Power)
	if err != nil {
		return nil, fmt.Errorf("power: %w", err)
	}
	return object{
		{"verdict", string(c.Verdict)},
		{"frequency_hz", c.Model.Frequency},
		{"lines", lines},
		{"phasor", phasor},
		{"fdtd", fdtd},
		{"settling", settling},
		{"stress", stress},
		{"agreement", agreement},
		{"grid", grid},
		{"requirements", requirementList(c.Requirements)},
		{"ratings", ratingList(c.Ratings)},
		{"power", power},
		{"convergence", convergenceObject(c.Convergence)},
		{"fidelity", fidelityList(c.Fidelity)},
		{"claims", claimList(c.Claims)},
		{"space_time", spaceTimeObject(c.SpaceTime)},
		{"bounces", bouncesObject(c.Bounces)},
		{"warnings", stringList(c.Warnings)},
	}, nil
}

func stringList(ss []string) list {
	l := make(list, len(ss))
	for i, s := range ss {
		l[i] = s
	}
	return l
}

// named collects the members of an object whose keys are names from the
// design.
type named []member

func (n *named) add(name string, v any) { *n = append(*n, member{name, v}) }

// object returns the members in order; kind says what they are, for the error.
func (n named) object(kind string) (object, error) {
	seen := make(map[string]bool, len(n))
	for _, m := range n {
		if m.key == "" {
			return nil, fmt.Errorf("an entry of kind %s has no name", kind)
		}
		if seen[m.key] {
			return nil, fmt.Errorf("two entries of kind %s have the name %q", kind, m.key)
		}
		seen[m.key] = true
	}
	return object(n), nil
}
