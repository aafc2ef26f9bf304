package line

import (
	_ "embed"
	"encoding/json"
	"strings"
	"sync"
)

// A Cable is a row of the cable table: nominal values, see CablePedigree.
type Cable struct {
	Type           string
	Z0             float64 // ohm
	VelocityFactor float64
	Capacitance    float64     // F/m
	Loss           []LossPoint // with rising frequency
	MaxVoltage     float64     // V rms, highest operating voltage
}

//go:embed cables.json
var cablesJSON []byte

// cableFile is the form of cables.json.
type cableFile struct {
	Pedigree string `json:"pedigree"`
	Cables   []struct {
		Type           string  `json:"type"`
		Z0             float64 `json:"z0_ohm"`
		VelocityFactor float64 `json:"velocity_factor"`
		Capacitance    float64 `json:"capacitance_pf_per_m"`
		Attenuation    []struct {
			MHz float64 `json:"mhz"`
			DB  float64 `json:"db_per_100m"`
		} `json:"attenuation"`
		MaxVoltage float64 `json:"max_voltage_v_rms"`
	} `json:"cables"`
}

// readCables reads the table once. It is part of the program, and a fault in
// it is the programmer's.
var readCables = sync.OnceValue(func() cableFile {
	var f cableFile
	if err := json.Unmarshal(cablesJSON, &f); err != nil {
		panic("line: cables.json is not readable")
	}
	return f
})

// CablePedigree tells where the cable table comes from and how far to trust
// it.
func CablePedigree() string { return readCables().Pedigree }

// Cables is the cable table.
func Cables() []Cable {
	var out []Cable
	for _, row := range readCables().Cables {
		c := Cable{Type: row.Type, Z0: row.Z0, VelocityFactor: row.VelocityFactor, Capacitance: row.Capacitance * 1e-12, MaxVoltage: row.MaxVoltage}
		for _, a := range row.Attenuation {
			c.Loss = append(c.Loss, LossPoint{a.MHz * 1e6, a.DB / 100 / NeperDB})
		}
		out = append(out, c)
	}
	return out
}

// CableNames are the types of the cable table, to suggest one from.
func CableNames() []string {
	var out []string
	for _, c := range Cables() {
		out = append(out, c.Type)
	}
	return out
}

// FindCable finds a cable by its type. Case, blanks, hyphens and a /U at the
// end do not matter: RG-213, rg213 and RG 213/U are one.
func FindCable(name string) (Cable, bool) {
	for _, c := range Cables() {
		if plainType(c.Type) == plainType(name) {
			return c, true
		}
	}
	return Cable{}, false
}

func plainType(s string) string {
	s = strings.NewReplacer("-", "", " ", "").Replace(strings.ToUpper(s))
	return strings.TrimSuffix(s, "/U")
}
