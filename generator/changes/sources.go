package changes

// sourcesOf tells which sources differ: a newer edition, another checked state.
// They are told beside the materials, whose own values they may not touch.
func sourcesOf(old, now *Statement) []Change {
	list := []Change{}
	for i, j := 0, 0; i < len(old.Sources) || j < len(now.Sources); {
		switch {
		case j == len(now.Sources) || i < len(old.Sources) && old.Sources[i].ID < now.Sources[j].ID:
			list = append(list, sourceChange(old.Sources[i], Source{ID: old.Sources[i].ID}, Removed))
			i++
		case i == len(old.Sources) || now.Sources[j].ID < old.Sources[i].ID:
			list = append(list, sourceChange(Source{ID: now.Sources[j].ID}, now.Sources[j], Added))
			j++
		default:
			if old.Sources[i] != now.Sources[j] {
				list = append(list, sourceChange(old.Sources[i], now.Sources[j], Changed))
			}
			i++
			j++
		}
	}
	return list
}

func sourceChange(old, now Source, what string) Change {
	c := Change{ID: now.ID, Name: or(now.Text, old.Text), Change: what, Meaning: []string{}, Fields: []Field{}, Curves: []CurveDifference{}}
	c.text("text", old.Text, now.Text, false)
	c.text("checked", old.Checked, now.Checked, false)
	c.text("superseded_by", old.SupersededBy, now.SupersededBy, false)
	c.text("note", old.Note, now.Note, false)
	return c
}
