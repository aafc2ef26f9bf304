package data

import (
	"fmt"

	"linewitness/sim/record"
)

func powerObject(p record.Power) (object, error) {
	phasor, err := auditValue(p.Phasor)
	if err != nil {
		return nil, fmt.Errorf("phasor: %w", err)
	}
	fdtd, err := auditValue(p.FDTD)
	if err != nil {
		return nil, fmt.Errorf("fdtd: %w", err)
	}
	return object{{"phasor", phasor}, {"fdtd", fdtd}}, nil
}

// auditValue is null where no audit was made, for zeros would be read as powers.
func auditValue(a record.PowerAudit) (any, error) {
	if len(a.Sections)+len(a.Elements)+len(a.Loads) == 0 && a.Delivered == 0 {
		return nil, nil
	}
	return auditObject(a)
}

func auditObject(a record.PowerAudit) (object, error) {
	var sections named
	for _, s := range a.Sections {
		sections.add(s.Name, object{
			{"in_w", s.In},
			{"out_w", s.Out},
			{"dissipated_w", s.Dissipated},
			{"stored_j", s.Stored},
		})
	}
	along, err := sections.object("section")
	if err != nil {
		return nil, err
	}
	elements, err := partPowers("element", a.Elements)
	if err != nil {
		return nil, err
	}
	loads, err := partPowers("load", a.Loads)
	if err != nil {
		return nil, err
	}
	return object{
		{"available_w", a.Available},
		{"delivered_w", a.Delivered},
		{"reflected_w", a.Reflected},
		{"dissipated_w", a.Dissipated},
		{"in_loads_w", a.InLoads},
		{"balance_w", a.Balance},
		{"balance_relative", a.Relative},
		{"balance_allowed", a.Allowed},
		{"closed", a.Closed},
		{"stored_j", a.Stored},
		{"q", a.Q},
		{"sections", along},
		{"elements", elements},
		{"loads", loads},
	}, nil
}

func partPowers(kind string, parts []record.PartPower) (object, error) {
	var n named
	for _, p := range parts {
		n.add(p.Name, object{{"power_w", p.Power}})
	}
	return n.object(kind)
}
