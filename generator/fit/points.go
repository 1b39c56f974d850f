package fit

import (
	"bytes"
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"math"
	"strconv"
	"strings"
	"unicode/utf8"

	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// MaxBytes is the most that a points file may have.
const MaxBytes = 64 << 20

// shownFindings is how many rows of rubbish are told one by one.
const shownFindings = 20

// ReadPoints reads measured points from CSV: temperature and resistance (or
// resistivity, or resistance_ratio), units in the head, optionally the standard
// uncertainties uncertainty and uncertainty_T. Points come out in SI. They are
// not to be used when a finding is an error.
func ReadPoints(src *place.Source) ([]Point, Header, []place.Finding) {
	r := &pointsReader{list: place.List{Source: src}, src: src}
	if len(src.Text) > MaxBytes {
		r.list.Add("file-too-large", place.Error, place.Position{File: src.File}, "the file is larger than 64 MiB", "split it, or average the readings")
		return nil, Header{}, r.list.Findings
	}
	r.csv = csv.NewReader(bytes.NewReader(bytes.TrimPrefix(src.Text, []byte("\ufeff"))))
	r.csv.ReuseRecord, r.csv.FieldsPerRecord, r.csv.TrimLeadingSpace = true, -1, true
	if !r.head() {
		return nil, r.header, r.list.Findings
	}
	r.rows()
	return r.points, r.header, r.list.Findings
}

// codePoints turns a column in bytes, as CSV tells it, into one in code points.
func (r *pointsReader) codePoints(line, column int) int {
	text := r.src.Line(line)
	return utf8.RuneCountInString(text[:max(0, min(column-1, len(text)))]) + 1
}

type pointsReader struct {
	src    *place.Source
	csv    *csv.Reader
	list   place.List
	header Header
	width  int
	points []Point
	untold int // findings beyond those shown
}

func (r *pointsReader) add(code string, field int, message, mend string) {
	if len(r.list.Findings) >= shownFindings {
		r.untold++
		return
	}
	line, column := 1, 1
	if field >= 0 {
		line, column = r.csv.FieldPos(field)
		column = r.codePoints(line, column)
	}
	r.list.Add(code, place.Error, r.src.At(line, column, 1), message, mend)
}

// head reads the first row; false after a finding that leaves nothing to read.
func (r *pointsReader) head() bool {
	row, err := r.csv.Read()
	if err != nil {
		r.add("points-unreadable", -1, "the file has no head", "begin with a row such as temperature / °C,resistance / Ω")
		return false
	}
	if len(row) == 1 && strings.Contains(row[0], ";") {
		r.add("points-semicolons", 0, "the columns are separated by semicolons", "save the file with commas between columns and decimal points")
		return false
	}
	r.width = len(row)
	r.header = Header{Temperature: -1, Value: -1, Uncertainty: -1, UncertaintyT: -1}
	for i, cell := range row {
		r.column(i, cell)
	}
	h := &r.header
	if len(r.list.Findings) == 0 && (h.Temperature < 0 || h.Value < 0) {
		r.add("points-columns", -1, "the head names no temperature and value", "name the columns temperature / °C and resistance / Ω")
	}
	return len(r.list.Findings) == 0 && r.uncertaintyUnits()
}

func (r *pointsReader) column(i int, cell string) {
	name, unit := splitHead(cell)
	h := &r.header
	take := func(at *int) bool {
		if *at >= 0 {
			r.add("points-columns", i, "the column "+quote(name)+" stands twice", "keep one of the two")
			return false
		}
		*at = i
		return true
	}
	h.Columns = append(h.Columns, Column{Name: name})
	switch kind, isValue := valueKinds[name]; {
	case name == "temperature":
		if take(&h.Temperature) {
			r.unit(i, quantity.Temperature, unit)
		}
	case isValue:
		if take(&h.Value) {
			h.Kind = kind
			r.unit(i, kind, unit)
			h.ValueUnit = h.Columns[i].Unit
		}
	case name == "uncertainty":
		take(&h.Uncertainty)
		h.Columns[i].Unit = quantity.Unit{Symbol: unit}
	case name == "uncertainty_T":
		if take(&h.UncertaintyT) {
			r.unit(i, quantity.TemperatureDifference, unit)
		}
	default:
		mend := "the columns are " + strings.Join(columnNames, ", ")
		if near := place.Near(name, columnNames); near != "" {
			mend = "did you mean " + near + "?"
		}
		r.add("points-columns", i, "the column "+quote(cell)+" is not known", mend)
	}
}

func (r *pointsReader) unit(i int, kind quantity.Kind, spelled string) {
	if spelled == "" && kind == quantity.Ratio {
		spelled = "1"
	}
	if spelled == "" {
		r.add("unit-missing", i, "the column "+quote(r.header.Columns[i].Name)+" has no unit", "write it in the head: "+r.header.Columns[i].Name+" / "+quantity.Units(kind)[0].Symbol)
		return
	}
	u, ok := quantity.FindUnit(kind, spelled)
	if !ok {
		r.add("unit-unknown", i, quote(spelled)+" is no unit of "+string(kind), "write for example "+quantity.NearUnit(kind, ""))
	}
	r.header.Columns[i].Unit = u
}

// uncertaintyUnits finds the unit of the uncertainty once the value is known:
// the value's kind, or a share of the value.
func (r *pointsReader) uncertaintyUnits() bool {
	h := &r.header
	if h.Uncertainty < 0 {
		return true
	}
	spelled := h.Columns[h.Uncertainty].Unit.Symbol
	if u, ok := quantity.FindUnit(quantity.Ratio, spelled); ok && spelled != "" && h.Kind != quantity.Ratio {
		h.Columns[h.Uncertainty].Unit, h.Relative = u, true
		return true
	}
	r.unit(h.Uncertainty, h.Kind, spelled)
	return len(r.list.Findings) == 0
}

func (r *pointsReader) rows() {
	for {
		row, err := r.csv.Read()
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			r.broken(err)
			break
		}
		r.row(row)
	}
	if r.untold > 0 {
		r.list.Add("points-unreadable", place.Error, place.Position{File: r.src.File}, fmt.Sprintf("%d more findings of this kind are not shown", r.untold), "mend the first ones, then look again")
	}
}

func (r *pointsReader) broken(err error) {
	var p *csv.ParseError
	line, column := 1, 1
	if errors.As(err, &p) {
		line, column, err = p.Line, r.codePoints(p.Line, p.Column), p.Err
	}
	r.list.Add("points-unreadable", place.Error, r.src.At(line, column, 1), "the row cannot be read: "+err.Error(), "look at the quotes in this row")
}

func (r *pointsReader) row(row []string) {
	if len(row) != r.width {
		r.wrongWidth(row)
		return
	}
	h := r.header
	if name, _ := splitHead(row[h.Temperature]); name == "temperature" {
		r.add("points-columns", h.Temperature, "the head stands here again", "keep one head, and one unit for the whole file")
		return
	}
	line, _ := r.csv.FieldPos(0)
	p := Point{Line: line}
	t, ok := r.number(row, h.Temperature)
	y, ok2 := r.number(row, h.Value)
	if !ok || !ok2 {
		return
	}
	p.T, p.Y = h.Columns[h.Temperature].Unit.ToSI(t), h.ValueUnit.ToSI(y)
	switch {
	case p.T < 0:
		r.add("temperature-below-absolute-zero", h.Temperature, "the temperature "+row[h.Temperature]+" lies below absolute zero", "look at the unit: K or °C?")
		return
	case !(p.Y > 0):
		r.add("row-not-positive", h.Value, "the value "+row[h.Value]+" is not above zero", "average both polarities, and look at the leads")
		return
	}
	if r.uncertainties(row, &p) {
		r.points = append(r.points, p)
	}
}

func (r *pointsReader) wrongWidth(row []string) {
	if len(row) == 1 && strings.TrimSpace(row[0]) == "" {
		return
	}
	message, mend := fmt.Sprintf("the row has %d cells, the head %d", len(row), r.width), "write every column in every row"
	if len(row) > r.width {
		mend = "if numbers have commas, write decimal points"
	}
	r.add("points-unreadable", 0, message, mend)
}

func (r *pointsReader) uncertainties(row []string, p *Point) bool {
	h := r.header
	if h.Uncertainty >= 0 {
		u, ok := r.number(row, h.Uncertainty)
		if !ok {
			return false
		}
		p.U = h.Columns[h.Uncertainty].Unit.ToSI(u)
		if h.Relative {
			p.U = float64(p.U * p.Y)
		}
		if !(p.U > 0) {
			r.add("row-not-positive", h.Uncertainty, "the uncertainty "+row[h.Uncertainty]+" is not above zero", "leave the column out when it is not known")
			return false
		}
	}
	if h.UncertaintyT >= 0 {
		u, ok := r.number(row, h.UncertaintyT)
		if !ok {
			return false
		}
		p.UT = h.Columns[h.UncertaintyT].Unit.ToSI(u)
	}
	return true
}

func (r *pointsReader) number(row []string, i int) (float64, bool) {
	text := strings.TrimSpace(row[i])
	if strings.HasPrefix(text, "−") {
		text = "-" + strings.TrimPrefix(text, "−")
	}
	x, err := strconv.ParseFloat(text, 64)
	switch {
	case strings.Contains(text, ","):
		r.add("comma-decimal", i, "the number "+quote(text)+" has a comma", "write a decimal point: "+strings.Replace(text, ",", ".", 1))
	case text == "":
		r.add("value-missing", i, "no number stands here", "write the reading, or take the row out")
	case err != nil && !math.IsInf(x, 0):
		r.add("number-not-read", i, quote(text)+" is no number", "write a plain number with a decimal point; units stand in the head")
	case math.IsNaN(x) || math.IsInf(x, 0):
		r.add("number-not-finite", i, "the number "+quote(text)+" is not finite", "take the row out")
	default:
		return x, true
	}
	return 0, false
}

func quote(s string) string {
	if len(s) > 60 {
		s = strings.ToValidUTF8(s[:60], "") + "…"
	}
	return "“" + s + "”"
}
