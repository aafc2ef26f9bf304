package syntax

import (
	"bytes"
	"errors"
	"fmt"
	"strings"
	"testing"
)

func decoder(inflated int) *File {
	return &File{limits: Limits{Depth: 4, Inflated: inflated}, inflated: inflated}
}

func TestDecode(t *testing.T) {
	text := strings.Repeat("waveform ", 100)
	z := NewStream(Dict{}, []byte(text))
	if len(z.Data) >= len(text) {
		t.Errorf("%d bytes from %d", len(z.Data), len(text))
	}
	for _, s := range []*Stream{
		z,
		NewLongStream(Dict{"DecodeParms": Null{}}, []byte(text)),
		{Dict{"Filter": Array{Name("FlateDecode")}, "DecodeParms": Array{Dict{"Predictor": Number("1")}}}, z.Data},
		{Dict{}, []byte(text)},
		{Dict{"Filter": Array{}}, []byte(text)},
	} {
		if got, err := decoder(len(text)).Decode(s); err != nil || string(got) != text {
			t.Errorf("%v: %d bytes, error %v", s.Dict, len(got), err)
		}
		if _, err := decoder(len(text) - 1).Decode(s); !errors.Is(err, ErrLimit) {
			t.Errorf("%v: error %v, want that of the limit", s.Dict, err)
		}
	}
}

// The limit is for all streams together.
func TestInflatedTogether(t *testing.T) {
	f := decoder(10)
	s := NewStream(Dict{}, make([]byte, 6))
	if _, err := f.Decode(s); err != nil {
		t.Fatal(err)
	}
	if _, err := f.Decode(s); !errors.Is(err, ErrLimit) {
		t.Errorf("error %v", err)
	}
}

func TestDecodeRefuses(t *testing.T) {
	for reason, d := range map[string]Dict{
		"filter [LZWDecode]":                       {"Filter": Name("LZWDecode")},
		"filter [FlateDecode FlateDecode]":         {"Filter": Array{Name("FlateDecode"), Name("FlateDecode")}},
		"compressed data":                          {"Filter": Name("FlateDecode")},
		"predictor 2 of 1 colours of 8 bits":       {"Filter": Name("FlateDecode"), "DecodeParms": Dict{"Predictor": Number("2")}},
		"predictor 12 of 3 colours of 8 bits":      {"Filter": Name("FlateDecode"), "DecodeParms": Dict{"Predictor": Number("12"), "Colors": Number("3")}},
		"4 bytes are not rows of 4":                {"Filter": Name("FlateDecode"), "DecodeParms": Dict{"Predictor": Number("12"), "Columns": Number("4")}},
		"4 bytes are not rows of 9223372036854775": {"Filter": Name("FlateDecode"), "DecodeParms": Dict{"Predictor": Number("12"), "Columns": Number("9223372036854775807")}},
		"wrong kind":                               {"Filter": Name("FlateDecode"), "DecodeParms": Number("1")},
	} {
		data := []byte("data")
		if d["DecodeParms"] != nil {
			data = deflate(data, fast)
		}
		if _, err := decoder(100).Decode(&Stream{d, data}); err == nil || !strings.Contains(err.Error(), reason) {
			t.Errorf("%v: error %v, want one with %q", d, err, reason)
		}
	}
}

// Rows of all five filters come back as the bytes that they were made of by the
// definitions of ISO/IEC 15948, 9.2.
func TestPredictors(t *testing.T) {
	const columns = 3
	want := [][]byte{{10, 20, 30}, {11, 22, 33}, {12, 20, 40}, {9, 200, 1}, {255, 0, 7}}
	var data []byte
	above := make([]byte, columns)
	for filter, row := range want {
		data = append(data, byte(filter))
		for i, x := range row {
			var left, corner byte
			if i > 0 {
				left, corner = row[i-1], above[i-1]
			}
			expected := [5]byte{0, left, above[i], byte((int(left) + int(above[i])) / 2), nearest(left, above[i], corner)}
			data = append(data, x-expected[filter])
		}
		above = row
	}
	got, err := unpredict(data, columns)
	if err != nil || !bytes.Equal(got, bytes.Join(want, nil)) {
		t.Errorf("%v, error %v", got, err)
	}
	if _, err := unpredict([]byte{5, 0, 0, 0}, columns); err == nil {
		t.Error("filter 5 is taken")
	}
}

// nearest is the one of the neighbours that is closest to left + above - corner,
// the first of equals.
func nearest(left, above, corner byte) byte {
	p := int(left) + int(above) - int(corner)
	best := left
	for _, x := range []byte{above, corner} {
		if distance(p, int(x)) < distance(p, int(best)) {
			best = x
		}
	}
	return best
}

func distance(a, b int) int { return max(a-b, b-a) }

func TestRepack(t *testing.T) {
	var data []byte
	for i := range 500 {
		data = fmt.Appendf(data, "%d 0 %d 1 re f\n", i, i*i)
	}
	s := &Stream{Dict{"Filter": Name("FlateDecode")}, deflate(data, fast)}
	before := len(s.Data)
	f := decoder(1 << 20)
	if err := f.Repack(s); err != nil || len(s.Data) >= before {
		t.Errorf("%d bytes of %d, error %v", len(s.Data), before, err)
	}
	if got, err := f.Decode(s); err != nil || !bytes.Equal(got, data) {
		t.Errorf("other data, error %v", err)
	}
}
