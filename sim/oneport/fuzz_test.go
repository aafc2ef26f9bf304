package oneport

import (
	"math/cmplx"
	"testing"
)

// FuzzRead: no bytes make Read panic; what it refuses it tells of at a place
// in the file; what it reads has rising finite frequencies and an impedance at
// each of them and between.
func FuzzRead(f *testing.F) {
	for _, s := range []string{
		"# MHz S MA R 50\n2 0.894 -12.136\n3 1 180",
		"! c\n#\n1 0.5 90 ! d",
		"# HZ Y RI R 50\r\n1 1 0\r\n2 0 0",
		"# GHz Z DB R 75 100\n1 1 0",
		"[Version] 2.0\n# kHz Z RI\n[Number of Ports] 1\n[Reference]\n75\n[Number of Frequencies] 2\n[Begin Information]\n[End Information]\n[Network Data]\n1 50 0\n2 75 1\n[End]\n",
		"#\n1 .1 0 .9 0 .9 0 .1 0\n",
		"[",
	} {
		f.Add([]byte(s))
	}
	f.Fuzz(func(t *testing.T, src []byte) {
		table, err := Read("f.s1p", src)
		if err != nil {
			e, ok := err.(*Error)
			if !ok || e.Line < 0 || (e.Line > 0) != (e.Column > 0) || e.Message == "" {
				t.Fatalf("%#v", err)
			}
			return
		}
		points := table.Points()
		for i, p := range points {
			if z, err := table.At(p.F); err != nil || cmplx.IsNaN(z) || i > 0 && p.F <= points[i-1].F {
				t.Errorf("point %d, %+v: %v, %v", i, p, z, err)
			}
			if i == 0 {
				continue
			}
			if z, err := table.At(points[i-1].F/2 + p.F/2); err != nil || cmplx.IsNaN(z) {
				t.Errorf("before point %d: %v, %v", i, z, err)
			}
			table.Warnings(p.F)
		}
	})
}
