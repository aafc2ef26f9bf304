package data

import (
	"bytes"
	"encoding/csv"
	"fmt"
	"math"
	"strconv"

	"linewitness/sim/record"
)

// A CSVFile is one of the CSV files of a record.
type CSVFile struct {
	Name string // "waveforms", "envelopes" or "error"
	Data []byte
}

// CSV returns the waveforms, the envelopes and the agreement error of a record,
// each as one file for all cases: RFC 4180 (comma, CRLF), one header line, the
// case in the first column, the unit at the end of a column's name. A field is
// empty where a row has no such value.
//
// It fails if the samples of a profile or a waveform do not match in number.
func CSV(r *record.Record) ([]CSVFile, error) {
	var files []CSVFile
	waves := newWaveforms(r)
	for _, f := range []struct {
		name   string
		header []string
		rows   func(*table, *record.Case) error
		size   int // about that of the file, if it is known
	}{
		{"waveforms", waves.header, waves.rows, waves.size(r)},
		{"envelopes", envelopeHeader, envelopeRows, 0},
		{"error", errorHeader, errorRows, 0},
	} {
		t := newTable(f.header)
		t.buf.Grow(f.size)
		for i := range r.Cases {
			if err := f.rows(t, &r.Cases[i]); err != nil {
				return nil, fmt.Errorf("data: %s of case %q: %w", f.name, r.Cases[i].Name, err)
			}
		}
		content, err := t.bytes()
		if err != nil {
			return nil, fmt.Errorf("data: %s: %w", f.name, err)
		}
		files = append(files, CSVFile{f.name, content})
	}
	return files, nil
}

// The significant digits of CSV numbers. Places and times have the most, so that
// two neighbours differ at the end of the longest run. Values have a hundred times
// what the witnesses agree to, and what is a difference of two witnesses has fewer
// still: it is not known better.
const (
	csvDigits   = 9
	valueDigits = 6 // of a sample: of the largest of its waveform, the others to the same place
	errorDigits = 4
)

// A table writes the rows of one CSV file.
type table struct {
	buf   bytes.Buffer
	w     *csv.Writer
	width int
	row   []string
}

func newTable(header []string) *table {
	t := &table{width: len(header)}
	t.w = csv.NewWriter(&t.buf)
	t.w.UseCRLF = true
	t.text(header...)
	t.end()
	return t
}

// text appends text fields to the current row.
func (t *table) text(fields ...string) { t.row = append(t.row, fields...) }

// numbers appends number fields to the current row; what is not a number
// leaves its field empty.
func (t *table) numbers(xs ...float64) { t.digits(csvDigits, xs...) }

func (t *table) digits(n int, xs ...float64) {
	for _, x := range xs {
		field := ""
		if !math.IsNaN(x) && !math.IsInf(x, 0) {
			field = strconv.FormatFloat(x+0, 'g', n, 64)
		}
		t.row = append(t.row, field)
	}
}

// sample appends x to the place at which the largest value of its kind has its
// last digit.
func (t *table) sample(x, largest float64) {
	if largest == 0 || math.IsNaN(x) || math.IsInf(x, 0) {
		t.digits(1, x)
		return
	}
	last := exponent(largest) - (valueDigits - 1)
	if math.Abs(x) < math.Pow10(last)/2 {
		x = 0
	}
	if x == 0 {
		t.digits(1, 0)
		return
	}
	t.digits(max(exponent(x)-last+1, 1), x)
}

// exponent is that of the first digit of x.
func exponent(x float64) int { return int(math.Floor(math.Log10(math.Abs(x)))) }

// end ends the current row.
func (t *table) end() {
	if len(t.row) != t.width {
		panic("data: a row that does not match its header")
	}
	_ = t.w.Write(t.row) // bytes reports the first error
	t.row = t.row[:0]
}

func (t *table) bytes() ([]byte, error) {
	t.w.Flush()
	return t.buf.Bytes(), t.w.Error()
}
