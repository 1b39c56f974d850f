package changes

import (
	"math"
	"sort"
	"strconv"
)

// verdicts compares what the studies of both statements say of each material.
func (r *Report) verdicts(old, now *Statement) {
	was := map[string]string{} // ID in the old statement by the one in the new
	for i := range r.Materials {
		if c := &r.Materials[i]; c.Change == Renamed {
			was[c.ID] = c.Was
		}
	}
	before, after := studiesByKey(old), studiesByKey(now)
	for _, key := range sortedKeys(after) {
		if o := before[key]; o != nil {
			r.study(o, after[key], was)
		} else {
			r.Studies = append(r.Studies, Moved{after[key].Study, after[key].Title, after[key].Document, Added})
		}
	}
	for _, key := range sortedKeys(before) {
		if o := before[key]; after[key] == nil {
			r.Studies = append(r.Studies, Moved{o.Study, o.Title, o.Document, Removed})
		}
	}
	byLostMargin(r.Verdicts)
	byLostMargin(r.Margins)
}

// studiesByKey names each study by document, kind and title; the second one
// of the same name by its number.
func studiesByKey(s *Statement) map[string]*Study {
	m := map[string]*Study{}
	for i := range s.Studies {
		o := &s.Studies[i]
		key := o.Document + "\n" + o.Study + "\n" + o.Title
		for n := 2; m[key] != nil; n++ {
			key = o.Document + "\n" + o.Study + "\n" + o.Title + "\n" + strconv.Itoa(n)
		}
		m[key] = o
	}
	return m
}

func sortedKeys(m map[string]*Study) []string {
	keys := make([]string, 0, len(m))
	for k := range m {
		keys = append(keys, k)
	}
	sort.Strings(keys)
	return keys
}

func (r *Report) study(old, now *Study, was map[string]string) {
	asked := sameParameters(old, now)
	for i := range now.Materials {
		n := &now.Materials[i]
		id := n.Material
		if w, ok := was[id]; ok {
			id = w
		}
		o := old.of(id, n.Size)
		if o == nil {
			o = old.of(n.Material, n.Size) // a document may still say the earlier ID
		}
		if o == nil {
			continue
		}
		f := Flip{Study: now.Study, Title: now.Title, Document: now.Document, Binding: now.Binding, Material: n.Material, Size: n.Size, Old: o.Verdict, New: n.Verdict,
			MarginOld: o.margin(), MarginNew: n.margin(), Parameters: !asked}
		switch {
		case f.Old != f.New:
			r.Verdicts = append(r.Verdicts, f)
		case !equal(f.MarginOld, f.MarginNew):
			r.Margins = append(r.Margins, f)
		}
	}
}

func (s *Study) of(id, size string) *Verdict {
	for i := range s.Materials {
		if s.Materials[i].Material == id && s.Materials[i].Size == size {
			return &s.Materials[i]
		}
	}
	return nil
}

// margin is the smallest of the requirements that can be told; nil when none
// can.
func (v *Verdict) margin() *float64 {
	least := math.Inf(1)
	for _, r := range v.Requirements {
		if r.Margin != nil {
			least = math.Min(least, *r.Margin)
		}
	}
	return finite(least)
}

func sameParameters(a, b *Study) bool {
	if len(a.Parameters) != len(b.Parameters) {
		return false
	}
	for i := range a.Parameters {
		if a.Parameters[i] != b.Parameters[i] {
			return false
		}
	}
	return true
}

// byLostMargin puts the greatest loss first; what cannot be told comes first
// of all, since nobody knows how bad it is.
func byLostMargin(list []Flip) {
	sort.SliceStable(list, func(i, j int) bool {
		a, okA := list[i].lostMargin()
		b, okB := list[j].lostMargin()
		if okA != okB {
			return !okA
		}
		return a > b
	})
}

// documents lists the pages of the new statement, or of the old one where
// they are gone, that rest on materials whose meaning changed.
func (r *Report) documents(old, now *Statement) {
	changed := map[string]bool{}
	for i := range r.Materials {
		if c := &r.Materials[i]; !c.MeansTheSame() {
			changed[c.ID], changed[c.Was] = true, true
		}
	}
	seen := map[string]bool{}
	for _, s := range []*Statement{now, old} {
		for _, d := range s.Documents {
			var on []string
			for _, id := range d.RestsOn {
				if changed[id] {
					on = append(on, id)
				}
			}
			if len(on) > 0 && !seen[d.Path] {
				r.Documents = append(r.Documents, Affected{d.Path, d.Title, on})
			}
			seen[d.Path] = true
		}
	}
	sort.SliceStable(r.Documents, func(i, j int) bool { return r.Documents[i].Path < r.Documents[j].Path })
}
