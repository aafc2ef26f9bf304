package data

import (
	"fmt"

	"linewitness/sim/record"
)

// Comparison returns a comparison as a JSON document, indented and with a final
// newline. It fails as JSON does, for two cases with one name.
func Comparison(c *record.Comparison) ([]byte, error) {
	var cases named
	for i := range c.Cases {
		cases.add(c.Cases[i].Name, caseEffectObject(&c.Cases[i]))
	}
	all, err := cases.object("case")
	if err != nil {
		return nil, fmt.Errorf("data: %w", err)
	}
	changes := make(list, len(c.Changes))
	for i := range c.Changes {
		changes[i] = changeObject(&c.Changes[i])
	}
	return render(object{
		{"format", record.Format},
		{"old", sideObject(&c.Old)},
		{"new", sideObject(&c.New)},
		{"worsened", c.Worsened},
		{"echo", c.Echo},
		{"changes", changes},
		{"cases", all},
	}), nil
}

func sideObject(s *record.Side) object {
	return object{
		{"file", s.File},
		{"kind", s.Kind},
		{"title", s.Title},
		{"number", s.Number},
		{"revision", s.Revision},
		{"sha256", s.SHA256},
		{"version", s.Version},
		{"verdict", string(s.Verdict)},
	}
}

// changeObject has the SI values only of a term whose words did not change.
func changeObject(c *record.Change) object {
	out := object{
		{"kind", string(c.Kind)},
		{"case", c.Case},
		{"place", c.Place},
		{"term", c.Term},
		{"old", textOrNull(c.Old)},
		{"new", textOrNull(c.New)},
	}
	if c.Unit != "" {
		out = append(out, member{"old_si", c.OldSI}, member{"new_si", c.NewSI}, member{"unit", c.Unit})
	}
	return out
}

func textOrNull(s string) any {
	if s == "" {
		return nil
	}
	return s
}

func caseEffectObject(c *record.CaseEffect) object {
	effects := make(list, len(c.Effects))
	for i := range c.Effects {
		e := &c.Effects[i]
		effects[i] = object{
			{"kind", string(e.Kind)},
			{"id", e.ID},
			{"quantity", e.Quantity},
			{"subject", e.Subject},
			{"direction", string(e.Direction)},
			{"old", figureValue(e.Old)},
			{"new", figureValue(e.New)},
		}
	}
	return object{
		{"old", textOrNull(string(c.Old))},
		{"new", textOrNull(string(c.New))},
		{"effects", effects},
	}
}

func figureValue(f *record.Figure) any {
	if f == nil {
		return nil
	}
	var value any = real(f.Value)
	if f.Complex {
		value = f.Value
	}
	return object{
		{"value", value},
		{"unit", f.Unit},
		{"uncertainty", f.Uncertainty},
		{"margin", f.Margin},
		{"limit_text", f.Limit},
		{"verdict", textOrNull(f.Verdict)},
	}
}
