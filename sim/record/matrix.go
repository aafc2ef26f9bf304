package record

// Matrix sets the cases side by side: a row for each requirement and key
// figure, a column for each case.
type Matrix struct {
	Cases []string
	Rows  []MatrixRow
}

// MatrixRow is one requirement or key figure in every case.
type MatrixRow struct {
	ID    string // of the requirement; empty for a key figure
	Label string // quantity and subject in words
	Unit  string
	Limit string       // of a requirement, in words
	Cells []MatrixCell // in the order of Matrix.Cases
}

// MatrixCell is one figure in one case.
type MatrixCell struct {
	Present    bool // false where a requirement is not judged in the case
	Value      float64
	Difference float64            // from the nominal case; NaN there and where either is missing
	Verdict    RequirementVerdict // empty for a key figure
	Worst      bool               // the least margin of the row; of a key figure without a limit, the farthest from nominal
}
