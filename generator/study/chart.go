package study

import "ohmfolio/generator/figure"

// Figure draws the chart. Each series has an ink and a dash; after four inks
// the dashes move on, so that sixteen curves can be told apart in grey.
func (c Chart) Figure(id string) *figure.Figure {
	f := &figure.Figure{ID: id, Title: c.Title, Description: c.Description, XTitle: c.XTitle, YTitle: c.YTitle, Width: 720, Height: 400}
	for _, x := range c.Marks {
		f.Marks = append(f.Marks, figure.Mark{X: x})
	}
	for i, s := range c.Series {
		if s.Apart {
			f.Points = append(f.Points, s.points(i%4+1))
			continue
		}
		ink, dash := i%4+1, (i+i/4)%4+1
		bandLabel := s.Label
		if len(s.Y) > 0 {
			bandLabel = ""
			f.Lines = append(f.Lines, figure.Line{Label: s.Label, X: s.X, Y: s.Y, Ink: ink, Dash: dash})
		}
		if len(s.Lower) > 0 {
			f.Areas = append(f.Areas, figure.Area{Label: bandLabel, X: s.X, Lower: s.Lower, Upper: s.Upper, Ink: ink})
		}
	}
	return f
}

func (s Series) points(ink int) figure.Points {
	p := figure.Points{Label: s.Label, Ink: ink}
	for i, x := range s.X {
		p.List = append(p.List, figure.Point{X: x, Y: s.Y[i]})
	}
	return p
}
