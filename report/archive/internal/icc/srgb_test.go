package icc

import (
	"encoding/binary"
	"math"
	"testing"
)

// The linear values of IEC 61966-2-1 are printed with four decimals.
const printed = 0.5e-4

// The matrix is that which IEC 61966-2-1 (5.3) prints; the standard rounds it so.
func TestMatrixOfTheStandard(t *testing.T) {
	want := matrix{{0.4124, 0.3576, 0.1805}, {0.2126, 0.7152, 0.0722}, {0.0193, 0.1192, 0.9505}}
	got := toXYZ()
	for r := range want {
		for c := range want[r] {
			if math.Abs(got[r][c]-want[r][c]) > printed {
				t.Errorf("row %d, column %d: %.5f, want %.4f", r, c, got[r][c], want[r][c])
			}
		}
	}
}

// White is the white of each space: D65 before, D50 after the adaptation.
func TestWhite(t *testing.T) {
	one := vector{1, 1, 1}
	const digits = 1e-7 // of the numbers below
	for _, c := range []struct {
		name      string
		got, want vector
	}{
		{"sRGB", toXYZ().apply(one), vector{0.9504559, 1, 1.0890578}}, // x/y and z/y of (0.3127, 0.3290)
		{"connection", adapted().apply(one), connection},
	} {
		for i := range c.got {
			if math.Abs(c.got[i]-c.want[i]) > digits {
				t.Errorf("%s: %v, want %v", c.name, c.got, c.want)
			}
		}
	}
}

// The curve has its two parts join, and takes values that can be computed by hand.
func TestLinear(t *testing.T) {
	for _, c := range []struct{ v, want float64 }{
		{0, 0},
		{1, 1},
		{0.04045, 0.0031308}, // the joint, as the standard prints it
		{0.5, 0.2140411},     // ((0.5 + 0.055)/1.055)^2.4
		{0.0323, 0.0025},     // 0.0323/12.92
	} {
		if got := linear(c.v); math.Abs(got-c.want) > printed/1000 {
			t.Errorf("linear(%v) = %.8f, want %.7f", c.v, got, c.want)
		}
	}
	// The standard's constants make the two parts differ at the joint by 3e-8.
	if step := linear(0.04045+1e-12) - linear(0.04045); math.Abs(step) > 1e-7 {
		t.Errorf("the curve jumps by %g", step)
	}
}

// parsed is a profile as a reader finds it.
type parsed struct {
	bytes []byte
	tags  map[string][]byte
}

func parse(t *testing.T) parsed {
	t.Helper()
	b := SRGB()
	p := parsed{b, map[string][]byte{}}
	for i := range int(be.Uint32(b[128:])) {
		e := b[132+12*i:]
		at, size := be.Uint32(e[4:]), be.Uint32(e[8:])
		if at%4 != 0 || int(at+size) > len(b) {
			t.Fatalf("tag %q at %d with %d bytes", e[:4], at, size)
		}
		p.tags[string(e[:4])] = b[at : at+size]
	}
	return p
}

func (p parsed) xyz(tag string) (v vector) {
	for i := range v {
		v[i] = float64(int32(binary.BigEndian.Uint32(p.tags[tag][8+4*i:]))) / (1 << 16)
	}
	return v
}

// value is the curve at v, between its entries on straight lines.
func (p parsed) value(v float64) float64 {
	entry := func(i int) float64 { return float64(be.Uint16(p.tags["rTRC"][12+2*i:])) / math.MaxUint16 }
	n := int(be.Uint32(p.tags["rTRC"][8:]))
	at := v * float64(n-1)
	i := min(int(at), n-2)
	return entry(i) + (at-float64(i))*(entry(i+1)-entry(i))
}

// The profile has its signature, version and size, and every tag that a matrix
// profile needs (ICC.1, 8.3.3).
func TestProfile(t *testing.T) {
	p := parse(t)
	if string(p.bytes[36:40]) != "acsp" || string(p.bytes[12:24]) != "mntrRGB XYZ " || int(be.Uint32(p.bytes)) != len(p.bytes) || p.bytes[8] != 2 {
		t.Errorf("header %q", p.bytes[:40])
	}
	for _, tag := range []string{"desc", "cprt", "wtpt", "rXYZ", "gXYZ", "bXYZ", "rTRC", "gTRC", "bTRC"} {
		if len(p.tags[tag]) == 0 {
			t.Errorf("no tag %q", tag)
		}
	}
}

// A reader of the profile finds, for some colours, what the definition gives for
// them, adapted to D50. The tolerance is a few steps of the 16 binary places, and
// the curve's 1024 straight lines.
func TestColours(t *testing.T) {
	const tolerance = 5e-5
	p := parse(t)
	m := matrix{}
	for c, tag := range []string{"rXYZ", "gXYZ", "bXYZ"} {
		for r, x := range p.xyz(tag) {
			m[r][c] = x
		}
	}
	for _, rgb := range [][3]uint8{
		{255, 255, 255}, {255, 0, 0}, {0, 255, 0}, {0, 0, 255}, {31, 56, 92}, {190, 60, 0}, {0, 110, 80}, {128, 128, 128}, {5, 9, 2},
	} {
		var read, defined vector
		for i, v := range rgb {
			read[i], defined[i] = p.value(float64(v)/255), linear(float64(v)/255)
		}
		got, want := m.apply(read), adapted().apply(defined)
		for i := range got {
			if math.Abs(got[i]-want[i]) > tolerance {
				t.Errorf("%v: XYZ %v, want %v", rgb, got, want)
				break
			}
		}
	}
	// The colorants under D50 that are commonly published of sRGB (common practice, from
	// memory), with a Z of D50 of 0.8252 in place of the 0.8249 of ICC.1.
	const otherWhite = 3e-4
	for tag, want := range map[string]vector{"rXYZ": {0.4361, 0.2225, 0.0139}, "gXYZ": {0.3851, 0.7169, 0.0971}, "bXYZ": {0.1431, 0.0606, 0.7141}} {
		got := p.xyz(tag)
		for i := range got {
			if math.Abs(got[i]-want[i]) > otherWhite {
				t.Errorf("%s: %v, want %v", tag, got, want)
				break
			}
		}
	}
}
