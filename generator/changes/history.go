package changes

// An Entry of a material's history: what one statement says that the one
// before did not.
type Entry struct {
	Statement   string // edition, or the words for the present state
	Revision    int
	Fingerprint string
	Date        string // of the sign-off
	Reason      string
	Author      string
	Reviewer    string
	Status      string
	Change      *Change // nil for the first statement that has the material
}

// History tells, newest first, how the material called id came to what it
// states now. Statements are in order of time, the last one being the present
// state; those in which nothing changed are left out.
func History(statements []*Statement, id string) []Entry {
	var list []Entry
	var next *Material
	var from *Statement // that next stands in, at place
	place := -1
	for k := len(statements) - 1; k >= 0; k-- {
		s := statements[k]
		i := s.index(id)
		if i < 0 && next != nil {
			i = s.formerly(next)
		}
		switch {
		case i < 0:
			continue
		case next != nil && sameLine(s, from, i, place):
			list[len(list)-1] = entry(s, next) // the older statement said it first
			from, place = s, i
			continue
		}
		m := s.at(i)
		if next == nil {
			list = append(list, entry(s, m))
		} else if c := between(m, next); c.Change == Unchanged {
			list[len(list)-1] = entry(s, m)
		} else {
			list[len(list)-1].Change = c
			list = append(list, entry(s, m))
		}
		next, from, place, id = m, s, i, m.ID
	}
	return list
}

// formerly is where a material stands under an ID that it had earlier, −1
// when it does not.
func (s *Statement) formerly(m *Material) int {
	for _, f := range m.Formerly {
		if i := s.index(f); i >= 0 {
			return i
		}
	}
	return -1
}

func between(old, now *Material) *Change {
	c := &Change{ID: now.ID, Name: now.Name, Change: Changed, old: old, new: now}
	if old.ID != now.ID {
		c.Change, c.Was = Renamed, old.ID
	}
	c.fill()
	return c
}

func entry(s *Statement, m *Material) Entry {
	e := Entry{Statement: s.Edition, Revision: m.Revision, Fingerprint: m.Fingerprint, Status: or(m.Status, "draft")}
	if m.SignOff != nil {
		e.Date, e.Reason, e.Author, e.Reviewer = m.SignOff.Date, m.SignOff.Reason, m.SignOff.Author, m.SignOff.Reviewer
	}
	return e
}

// A Row is one edition in the list of all.
type Row struct {
	Name      string
	Materials int
	Released  int
	Failing   int     // binding verdicts that did not hold
	Report    *Report // against the edition before, nil for the first
}

// Rows lists the editions, newest first.
func Rows(editions []*Statement) []Row {
	var list []Row
	for i := len(editions) - 1; i >= 0; i-- {
		s := editions[i]
		row := Row{Name: s.Edition, Materials: s.count(), Failing: s.failing()}
		for j := range s.count() {
			if s.released(j) {
				row.Released++
			}
		}
		if i > 0 {
			row.Report = Compare(editions[i-1], s, "edition "+editions[i-1].Edition, "edition "+s.Edition)
		}
		list = append(list, row)
	}
	return list
}

func (s *Statement) failing() int {
	n := 0
	for _, o := range s.Studies {
		n += o.NotHeld
	}
	return n
}
