package syntax

// streamSection reads a cross-reference stream (7.5.8).
func (f *File) streamSection(at int) (Dict, error) {
	v, err := f.indirect(0, at)
	if err != nil {
		return nil, err
	}
	s, ok := v.(*Stream)
	if !ok || s.Dict["Type"] != Name("XRef") {
		return nil, damaged("no cross-reference section at offset %d", at)
	}
	data, err := f.Decode(s)
	if err != nil {
		return nil, err
	}
	widths, err := f.widths(s.Dict)
	if err != nil {
		return nil, err
	}
	index, err := f.index(s.Dict)
	if err != nil {
		return nil, err
	}
	row := widths[0] + widths[1] + widths[2]
	for ; len(index) > 1; index = index[2:] {
		for n := index[0]; n < index[0]+index[1]; n++ {
			if len(data) < row {
				return nil, damaged("cross-reference stream of too few entries")
			}
			if err := f.note(n, entry(data, widths)); err != nil {
				return nil, err
			}
			data = data[row:]
		}
	}
	return s.Dict, nil
}

// widths are those of the fields of an entry, up to 8 bytes each.
func (f *File) widths(d Dict) (w [3]int, err error) {
	a, ok := d["W"].(Array)
	if !ok || len(a) != len(w) {
		return w, damaged("widths of a cross-reference stream")
	}
	for i := range w {
		if w[i], err = f.Int(a[i]); err != nil || w[i] < 0 || w[i] > 8 {
			return w, damaged("widths of a cross-reference stream")
		}
	}
	if w[1] == 0 {
		return w, damaged("widths of a cross-reference stream")
	}
	return w, nil
}

// index lists the first number and the count of each subsection.
func (f *File) index(d Dict) ([]int, error) {
	if d["Index"] == nil {
		n, err := f.direct(d, "Size")
		return []int{0, n}, err
	}
	a, ok := d["Index"].(Array)
	if !ok || len(a)%2 != 0 {
		return nil, damaged("index of a cross-reference stream")
	}
	out := make([]int, len(a))
	for i := range a {
		n, err := f.Int(a[i])
		if err != nil || n < 0 || n > f.limits.Objects+1 {
			return nil, damaged("index of a cross-reference stream")
		}
		out[i] = n
	}
	return out, nil
}

// entry is one entry of a cross-reference stream (table 18).
func entry(data []byte, w [3]int) place {
	field := func(n int) (x int) {
		for _, c := range data[:n] {
			x = x<<8 | int(c)
		}
		data = data[n:]
		return x
	}
	kind := 1
	if w[0] > 0 {
		kind = field(w[0])
	}
	second, third := field(w[1]), field(w[2])
	switch kind {
	case 1:
		return place{offset: second}
	case 2:
		if second > 0 {
			return place{container: Ref(second), index: third}
		}
	}
	return place{free: true}
}
