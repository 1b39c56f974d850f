package fit

import (
	"bytes"
	"encoding/csv"
	"errors"
	"io"
	"strings"

	"ohmfolio/generator/place"
)

// ReadRaw reads columns x,y (in any order) of any sign and meaning, for
// comparison with statistical references. Points come out as written.
func ReadRaw(src *place.Source) ([]Point, []place.Finding) {
	r := &pointsReader{list: place.List{Source: src}, src: src}
	r.csv = csv.NewReader(bytes.NewReader(bytes.TrimPrefix(src.Text, []byte("\ufeff"))))
	r.csv.ReuseRecord, r.csv.FieldsPerRecord, r.csv.TrimLeadingSpace = true, -1, true
	row, err := r.csv.Read()
	x, y := -1, -1
	for i, cell := range row {
		switch strings.TrimSpace(cell) {
		case "x":
			x = i
		case "y":
			y = i
		}
	}
	if err != nil || len(row) != 2 || x < 0 || y < 0 {
		r.add("points-columns", -1, "the head is not x,y", "begin with the row x,y or y,x")
		return nil, r.list.Findings
	}
	r.width = 2
	for {
		row, err := r.csv.Read()
		if errors.Is(err, io.EOF) {
			return r.points, r.list.Findings
		}
		if err != nil {
			r.broken(err)
			return nil, r.list.Findings
		}
		if len(row) != 2 {
			r.wrongWidth(row)
			continue
		}
		line, _ := r.csv.FieldPos(0)
		px, okX := r.number(row, x)
		py, okY := r.number(row, y)
		if okX && okY {
			r.points = append(r.points, Point{T: px, Y: py, Line: line})
		}
	}
}
