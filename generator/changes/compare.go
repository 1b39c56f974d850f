package changes

import "sort"

// Compare tells what differs between two statements; the labels name them.
func Compare(old, now *Statement, oldLabel, newLabel string) *Report {
	r := &Report{Old: oldLabel, New: newLabel, Same: true, Materials: []Change{}, Verdicts: []Flip{}, Margins: []Flip{}, Studies: []Moved{}, Documents: []Affected{}, Sources: sourcesOf(old, now)}
	pairs := pair(old, now)
	for i := range pairs {
		r.Same = r.Same && pairs[i].MeansTheSame()
	}
	r.Materials = append(r.Materials, pairs...)
	r.verdicts(old, now)
	r.documents(old, now)
	r.Same = r.Same && len(r.Verdicts) == 0 && len(r.Studies) == 0
	return r
}

// pair finds for every material of one statement that of the other, by ID and
// by earlier IDs. What two files say byte for byte the same is paired unread.
func pair(old, now *Statement) []Change {
	var list []Change
	taken := map[string]bool{}
	for j := range now.count() {
		id := now.id(j)
		i := old.index(id)
		switch {
		case i < 0:
			m := now.at(j)
			c := Change{ID: id, Name: m.Name, Change: Added, new: m}
			c.earlier(old, now, taken)
			c.fill()
			list = append(list, c)
		case sameLine(old, now, i, j):
			c := Change{ID: id, Change: Unchanged}
			c.fill()
			list = append(list, c)
			taken[id] = true
		default:
			m := now.at(j)
			c := Change{ID: id, Name: m.Name, Change: Changed, new: m, old: old.at(i)}
			c.fill()
			list = append(list, c)
			taken[id] = true
		}
	}
	for i := range old.count() {
		if id := old.id(i); !taken[id] {
			c := Change{ID: id, Name: old.at(i).Name, Change: Removed}
			c.fill()
			list = append(list, c)
		}
	}
	sort.SliceStable(list, func(i, j int) bool { return list[i].ID < list[j].ID })
	return list
}

// earlier looks for a new material under the IDs that it had formerly.
func (c *Change) earlier(old, now *Statement, taken map[string]bool) {
	for _, f := range c.new.Formerly {
		if c.old == nil && now.index(f) < 0 && !taken[f] {
			if c.old = old.find(f); c.old != nil {
				c.Change, c.Was = Renamed, f
				taken[f] = true
			}
		}
	}
}

// fill compares the two sides of one material, and forgets them when they say
// the same.
func (c *Change) fill() {
	c.Fields, c.Meaning, c.Curves = []Field{}, []string{}, []CurveDifference{}
	if c.old == nil || c.new == nil {
		return
	}
	c.Withdrawn = c.new.Status == "withdrawn" && c.old.Status != "withdrawn"
	c.keeping()
	c.stated()
	c.meaning()
	c.curves()
	c.band()
	if c.Change == Changed && len(c.Fields) == 0 && len(c.Meaning) == 0 {
		c.Change, c.old, c.new = Unchanged, nil, nil
	}
}
