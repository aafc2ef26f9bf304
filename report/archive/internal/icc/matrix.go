package icc

type (
	vector [3]float64
	matrix [3]vector // rows
)

func (m matrix) apply(v vector) (out vector) {
	for r := range m {
		for c := range v {
			out[r] += m[r][c] * v[c]
		}
	}
	return out
}

func (m matrix) times(n matrix) (out matrix) {
	for c := range n {
		col := m.apply(n.column(c))
		for r := range col {
			out[r][c] = col[r]
		}
	}
	return out
}

func (m matrix) column(c int) vector { return vector{m[0][c], m[1][c], m[2][c]} }

// inverse divides the adjugate by the determinant.
func (m matrix) inverse() (out matrix) {
	for r := range m {
		for c := range m {
			a, b, d, e := (r+1)%3, (r+2)%3, (c+1)%3, (c+2)%3
			out[c][r] = m[a][d]*m[b][e] - m[a][e]*m[b][d]
		}
	}
	det := 0.0
	for c := range m {
		det += m[0][c] * out[c][0]
	}
	for r := range out {
		for c := range out {
			out[r][c] /= det
		}
	}
	return out
}
