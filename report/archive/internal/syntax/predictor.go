package syntax

// predicted undoes the predictor of a filter's parameters (7.4.4.4).
func (f *File) predicted(data []byte, parms Value) ([]byte, error) {
	list, err := f.oneOrMore(parms)
	if err != nil || len(list) == 0 {
		return data, err
	}
	if _, none := list[0].(Null); none {
		return data, nil
	}
	d, err := As[Dict](f, list[0])
	if err != nil {
		return nil, err
	}
	num := func(k Name, missing int) int {
		if d[k] == nil || err != nil {
			return missing
		}
		var n int
		n, err = f.Int(d[k])
		return n
	}
	kind, columns := num("Predictor", 1), num("Columns", 1)
	colours, bits := num("Colors", 1), num("BitsPerComponent", 8)
	switch {
	case err != nil:
		return nil, err
	case kind == 1:
		return data, nil
	case kind < 10 || kind > 15 || colours != 1 || bits != 8 || columns < 1:
		return nil, damaged("predictor %d of %d colours of %d bits is not read", kind, colours, bits)
	}
	return unpredict(data, columns)
}

// unpredict undoes the PNG filters of rows of one byte a sample (ISO/IEC 15948,
// clause 9).
func unpredict(data []byte, columns int) ([]byte, error) {
	if columns >= len(data) && len(data) > 0 || len(data)%(columns+1) != 0 {
		return nil, damaged("%d bytes are not rows of %d", len(data), columns)
	}
	out := make([]byte, 0, len(data))
	up := make([]byte, columns)
	for ; len(data) > 0; data = data[columns+1:] {
		row := data[1 : columns+1]
		for i := range row {
			var left, corner byte
			if i > 0 {
				left, corner = out[len(out)-1], up[i-1]
			}
			p, ok := prediction(data[0], left, up[i], corner)
			if !ok {
				return nil, damaged("PNG filter %d", data[0])
			}
			out = append(out, row[i]+p)
		}
		up = out[len(out)-columns:]
	}
	return out, nil
}

// prediction is what a PNG filter expects from the neighbours of a byte.
func prediction(filter, left, up, corner byte) (p byte, ok bool) {
	switch filter {
	case 0:
		return 0, true
	case 1:
		return left, true
	case 2:
		return up, true
	case 3:
		return byte((int(left) + int(up)) / 2), true
	case 4:
		return paeth(int(left), int(up), int(corner)), true
	}
	return 0, false
}

func paeth(a, b, c int) byte {
	abs := func(x int) int { return max(x, -x) }
	pa, pb, pc := abs(b-c), abs(a-c), abs(a+b-2*c)
	switch {
	case pa <= pb && pa <= pc:
		return byte(a)
	case pb <= pc:
		return byte(b)
	}
	return byte(c)
}
