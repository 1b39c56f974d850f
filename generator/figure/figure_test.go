package figure

import (
	"bytes"
	"encoding/xml"
	"io"
	"math"
	"strings"
	"testing"
)

func sample() *Figure {
	f := &Figure{ID: "rho", Title: "A & B <curve>", Description: "two curves", XTitle: "temperature in °C", YTitle: "ρ in µΩ·cm"}
	var x, y, z, lo, hi []float64
	for i := 0; i < 190; i++ {
		t := float64(i)
		x = append(x, t-40)
		v := 43 + float64(0.004*t) - float64(0.00003*t)*t
		y, z = append(y, v), append(z, v+0.1)
		lo, hi = append(lo, v-0.05), append(hi, v+0.05)
	}
	f.Lines = []Line{{Label: "first", X: x, Y: y, Ink: 1, Dash: 1}, {Label: `<sec&ond"`, X: x, Y: z, Ink: 2, Dash: 2, Thin: true}}
	f.Areas = []Area{{X: x, Lower: lo, Upper: hi, Ink: 1}}
	return f
}

func draw(t *testing.T, f *Figure) string {
	t.Helper()
	var b bytes.Buffer
	if err := f.SVG(&b); err != nil {
		t.Fatal(err)
	}
	d := xml.NewDecoder(bytes.NewReader(b.Bytes()))
	for {
		_, err := d.Token()
		if err == io.EOF {
			return b.String()
		}
		if err != nil {
			t.Fatalf("%v in\n%s", err, b.String())
		}
	}
}

func TestSVG(t *testing.T) {
	s := draw(t, sample())
	for _, want := range []string{"A &amp; B &lt;curve&gt;", "&lt;sec&amp;ond&#34;", `class="area ink-1"`, `class="curve ink-2 dash-2 thin"`, "ρ in µΩ·cm"} {
		if !strings.Contains(s, want) {
			t.Errorf("%q is missing", want)
		}
	}
	if strings.Contains(s, "style=") {
		t.Error("an inline style")
	}
	if s != draw(t, sample()) {
		t.Error("two drawings of one figure differ")
	}
	if len(s) > 9000 {
		t.Errorf("%d bytes", len(s))
	}
}

func TestRefusesBadData(t *testing.T) {
	for name, f := range map[string]*Figure{
		"empty":   {},
		"nan":     {Lines: []Line{{X: []float64{1, 2}, Y: []float64{1, math.NaN()}}}},
		"inf":     {Lines: []Line{{X: []float64{1, math.Inf(1)}, Y: []float64{1, 2}}}},
		"lengths": {Lines: []Line{{X: []float64{1, 2}, Y: []float64{1}}}},
	} {
		if err := f.SVG(new(bytes.Buffer)); err == nil {
			t.Errorf("%s is drawn", name)
		}
	}
}

func TestDegenerateRanges(t *testing.T) {
	for _, y := range [][]float64{{5, 5}, {0, 0}, {-3, -3}, {1e-9, 1e-9}, {1, 1 + 1e-15}} {
		draw(t, &Figure{Lines: []Line{{X: []float64{0, 1}, Y: y}}})
	}
	draw(t, &Figure{Lines: []Line{{X: []float64{7}, Y: []float64{7}}}})
}

func TestTicksAreRoundAndInside(t *testing.T) {
	for _, c := range [][2]float64{{0, 1}, {-40, 85}, {1.5e-8, 1.9e-8}, {-272.15, 626.85}, {0.999, 1.001}} {
		list := Ticks(c[0], c[1], 6)
		if len(list) < 3 || len(list) > 13 {
			t.Errorf("%v: %d ticks %v", c, len(list), list)
		}
		for _, x := range list {
			if x < c[0]-1e-9*math.Abs(c[0]) || x > c[1]+1e-9*math.Abs(c[1]) {
				t.Errorf("%v: the tick %v lies outside", c, x)
			}
		}
	}
}

func TestLabelsDoNotTouch(t *testing.T) {
	f := sample()
	for i := range 6 {
		l := f.Lines[0]
		l.Label = strings.Repeat("x", i+1)
		f.Lines = append(f.Lines, l)
	}
	labels := f.layout().labels
	for i := 1; i < len(labels); i++ {
		if labels[i].y-labels[i-1].y < textHeight*unit {
			t.Errorf("labels %d and %d touch: %d, %d", i-1, i, labels[i-1].y, labels[i].y)
		}
	}
}

func TestCurveStaysOnCanvas(t *testing.T) {
	f := sample()
	l := f.layout()
	for _, line := range f.Lines {
		for i := range line.X {
			x, y := l.x.at(line.X[i]), l.y.at(line.Y[i])
			if x < l.x.from || x > l.x.to || y > l.y.from || y < l.y.to {
				t.Fatalf("point %d is drawn at %d, %d", i, x, y)
			}
		}
	}
}

func BenchmarkSVG(b *testing.B) {
	f := sample()
	var buf bytes.Buffer
	for b.Loop() {
		buf.Reset()
		if err := f.SVG(&buf); err != nil {
			b.Fatal(err)
		}
	}
	b.SetBytes(int64(buf.Len()))
}
