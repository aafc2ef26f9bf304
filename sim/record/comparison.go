package record

// A Comparison sets two versions of a design side by side: what changed in it,
// and what that did.
type Comparison struct {
	Old, New Side
	// Changes of the design, in the order of its file. Echo says why they are only
	// what the results repeat of the designs; it is empty where both design files
	// are at hand.
	Changes []Change
	Echo    string
	Cases   []CaseEffect // those of the new design, then those that it has no more
	// Worsened says that a verdict is worse than it was: of the design, of a case,
	// or of a requirement, a rating or a claim that both designs have.
	Worsened bool
}

// A Side is one of the two designs and where it is from.
type Side struct {
	File, Kind              string // Kind is "design file", "result" or "record"
	Title, Number, Revision string
	SHA256                  string // of the design file
	Version                 string // of the program that solved it
	Verdict                 Verdict
}

// ChangeKind says what happened to a term.
type ChangeKind string

// The kinds of changes.
const (
	AddedTerm   ChangeKind = "added"
	RemovedTerm ChangeKind = "removed"
	ChangedTerm ChangeKind = "changed"
	RenamedTerm ChangeKind = "renamed"
	RewordTerm  ChangeKind = "reworded" // other words for the same value
	FollowTerm  ChangeKind = "follows"  // the words stay, and another term changes what they mean
)

// A Change is one term of a design file that is not as it was.
type Change struct {
	Kind     ChangeKind
	Case     string // of a change in what a case changes; empty for the nominal design
	Place    string // "section main", "source", "requirement R1", "grid"
	Term     string // "length", "impedance r"; empty for the whole of Place
	Old, New string // as the files have them; empty for what is not there

	// Of a term that follows: what it means in both, in an SI unit.
	OldSI, NewSI float64
	Unit         string
}

// A CaseEffect is what the changes did in one case.
type CaseEffect struct {
	Name     string
	Old, New Verdict // empty where the case is not there
	Effects  []Effect
}

// EffectKind says what a figure is.
type EffectKind string

// The kinds of figures.
const (
	RequirementEffect EffectKind = "requirement"
	RatingEffect      EffectKind = "rating"
	ClaimEffect       EffectKind = "claim"
	FigureEffect      EffectKind = "key figure"
)

// Direction says which way a figure went.
type Direction string

// The directions.
const (
	Better    Direction = "better"
	Worse     Direction = "worse"
	AsBefore  Direction = "as before" // within its uncertainty
	Moved     Direction = "moved"     // a key figure, which is neither good nor bad
	NewFigure Direction = "new"
	NoMore    Direction = "no more"
)

// An Effect is one requirement, rating, claim or key figure in both designs.
type Effect struct {
	Kind              EffectKind
	ID                string // empty for a rating and a key figure
	Quantity, Subject string
	Old, New          *Figure // nil where it is not there
	Direction         Direction
}

// A Figure is the outcome of an effect in one of the designs. Numbers that it
// does not have are NaN.
type Figure struct {
	Value       complex128
	Complex     bool // both parts count
	Unit        string
	Uncertainty float64
	Margin      float64 // of a claim: tolerance less difference
	Limit       string  // in words
	Verdict     string  // "met", "confirmed", ...; empty for a key figure
}

// Where names a term: "case iced, load aerial, r".
func (c *Change) Where() string {
	s := c.Place
	if c.Case != "" {
		s = "case " + c.Case + ", " + s
	}
	if c.Term != "" {
		s += ", " + c.Term
	}
	return s
}

// Matters reports whether an effect is one to be told: anything but a figure that
// is as before.
func (e *Effect) Matters() bool { return e.Direction != AsBefore }
