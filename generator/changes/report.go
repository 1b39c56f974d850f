package changes

// A Report tells what differs between two statements. Its JSON form is a
// contract.
type Report struct {
	Old       string     `json:"old"`
	New       string     `json:"new"`
	Same      bool       `json:"no_change_of_meaning"`
	Materials []Change   `json:"materials"` // all of both statements, by ID
	Verdicts  []Flip     `json:"verdicts"`  // those that differ, by lost margin
	Margins   []Flip     `json:"margins"`   // the same verdict on another margin, by lost margin
	Studies   []Moved    `json:"studies"`   // added and removed
	Documents []Affected `json:"documents"` // that rest on what changed
	Sources   []Change   `json:"sources"`   // those that differ
}

// What happened to a material.
const (
	Added     = "added"
	Removed   = "removed"
	Renamed   = "renamed"
	Changed   = "changed"
	Unchanged = "none"
)

// Change is one material of either statement.
type Change struct {
	ID        string   `json:"id"`
	Was       string   `json:"was,omitempty"` // ID in the old statement, of a renamed one
	Name      string   `json:"name"`
	Change    string   `json:"change"`
	Withdrawn bool     `json:"withdrawn"` // in the new statement, and not in the old one
	Meaning   []string `json:"meaning"`   // what of the adopted data changed its meaning, in words
	Fields    []Field  `json:"fields"`

	Greatest *CurveDifference  `json:"greatest_curve_difference"`
	Curves   []CurveDifference `json:"curve_differences"` // one for each quantity that both tell
	Band     *BandDifference   `json:"band_difference"`

	old, new *Material
}

// Field is one stated value that differs. Numbers with a unit are told in the
// unit of the new statement.
type Field struct {
	Path     string   `json:"path"`
	Old      any      `json:"old"` // number, text, or null where it is not stated
	New      any      `json:"new"`
	Unit     string   `json:"unit,omitempty"`
	Relative *float64 `json:"relative"` // (new − old)/old; null when old is 0, and for temperatures
	OldText  string   `json:"old_text"` // as it was written
	NewText  string   `json:"new_text"`
	Aside    bool     `json:"record_keeping"` // who answers and when, not what is stated

	base string // path of the value that a limit or a ± belongs to
}

// CurveDifference is the greatest relative difference new/old − 1 of a curve
// over the range that both tell.
type CurveDifference struct {
	Quantity     string     `json:"quantity"` // resistivity or resistance-ratio
	Basis        string     `json:"basis"`    // of the adopted data; "old → new" when they differ
	PPM          float64    `json:"ppm"`
	AtC          float64    `json:"at_C"`
	CommonRangeC [2]float64 `json:"common_range_C"`
	ReferenceC   *float64   `json:"reference_C"` // of a ratio
}

// BandDifference is how far the edges of the band of the stated limits moved.
type BandDifference struct {
	Quantity string  `json:"quantity"`
	Words    string  `json:"words"` // "" , "no band before", "no band any more"
	LowerPPM float64 `json:"lower_ppm"`
	LowerAtC float64 `json:"lower_at_C"`
	UpperPPM float64 `json:"upper_ppm"`
	UpperAtC float64 `json:"upper_at_C"`
}

// Flip is one study's verdict on one material in both statements.
type Flip struct {
	Study      string   `json:"study"`
	Title      string   `json:"title"`
	Document   string   `json:"document"`
	Binding    bool     `json:"binding"`
	Material   string   `json:"material"`
	Size       string   `json:"size,omitempty"`
	Old        string   `json:"old"`
	New        string   `json:"new"`
	MarginOld  *float64 `json:"margin_old"` // smallest of its requirements that can be told; null when none can
	MarginNew  *float64 `json:"margin_new"`
	Parameters bool     `json:"parameters_changed"` // the question itself is another one
}

// Moved is a study that stands in one of the statements only.
type Moved struct {
	Study    string `json:"study"`
	Title    string `json:"title"`
	Document string `json:"document"`
	Change   string `json:"change"`
}

// Affected is a document that rests on materials whose meaning changed.
type Affected struct {
	Path      string   `json:"path"`
	Title     string   `json:"title"`
	Materials []string `json:"materials"`
}

// lostMargin is how much of a margin went; ok is false when it cannot be told.
func (f *Flip) lostMargin() (lost float64, ok bool) {
	if f.MarginOld == nil || f.MarginNew == nil {
		return 0, false
	}
	return *f.MarginOld - *f.MarginNew, true
}

// MeansTheSame tells whether nothing that the material states has changed.
func (c *Change) MeansTheSame() bool {
	if c.Change == Added || c.Change == Removed || c.Change == Renamed || c.Withdrawn || c.Greatest != nil && c.Greatest.PPM != 0 {
		return false
	}
	for i := range c.Fields {
		if !c.Fields[i].Aside {
			return false
		}
	}
	return len(c.Meaning) == 0
}
