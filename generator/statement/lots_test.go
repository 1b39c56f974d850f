package statement

import (
	"math"
	"strings"
	"testing"

	"ohmfolio/generator/library"
)

// TestShift: t(0.975, 4) = 2.776 (JCGM 100, table G.2, printed 2.78); five
// deviations with mean 0.4 % and s = 0.158 %, by hand.
func TestShift(t *testing.T) {
	s := Shift([]float64{0.002, 0.003, 0.004, 0.005, 0.006})
	sd := math.Sqrt((4e-6 + 1e-6 + 0 + 1e-6 + 4e-6) / 4)
	if math.Abs(s.Mean-0.004) > 1e-15 || math.Abs(s.SD-sd) > 1e-15 || math.Abs(s.Critical-2.7764451*sd/math.Sqrt(5)) > 1e-9 || !s.Shifted {
		t.Errorf("%+v", s)
	}
	if s := Shift([]float64{-0.01, 0.012, 0.003}); s.Shifted {
		t.Errorf("%+v", s)
	}
	if s := Shift(nil); s.N != 0 || s.Shifted {
		t.Errorf("%+v", s)
	}
}

func lotsOf(t *testing.T, csv string) (*Statement, *library.Library) {
	t.Helper()
	lib := library.FromFiles(map[string][]byte{
		"materials/sources.yaml": []byte("s: {kind: standard, title: T, number: N, checked: original}\n"),
		"materials/x.yaml":       []byte("name: X\nsource: s\nbasis: resistance\nresistivity: 50 µΩ·cm ± 2 %\nalpha: 1000 ppm/K\nreference_temperature: 20 °C\nvalid_range: 0 °C to 60 °C\nlots: x.csv\n"),
		"materials/x.csv":        []byte(csv),
	})
	if lib.Material("x") == nil {
		t.Fatal(lib.Findings)
	}
	return Of(lib, lib.Material("x")), lib
}

// TestLots: each lot is compared at its own temperature: at 30 °C the house
// value is 50·1.01 = 50.5 µΩ·cm.
func TestLots(t *testing.T) {
	s, _ := lotsOf(t, "date,lot,resistivity / µΩ·cm,temperature / °C,U / %,supplier\n2026-03-01,B,50.5,30,0.4,one\n2026-01-01,A,50,20,0.4,one\n2026-05-01,C,51.5,20,0.4,two\n2026-06-01,D,50.9,20,0.4,two\n2026-07-01,E,49,90,,\n")
	l := s.Lots
	if l == nil || len(l.Table.Rows) != 5 || l.Table.Rows[0][1] != "A" {
		t.Fatalf("%+v", l)
	}
	for i, want := range []string{"0.00", "0.00", "3.00", "1.80"} {
		if !strings.HasPrefix(l.Table.Rows[i][5], want) {
			t.Errorf("lot %d: %v, want %s %%", i, l.Table.Rows[i], want)
		}
	}
	judged := []string{"within limits", "within limits", "outside limits", "within limits, not by its uncertainty", "measured outside the valid range"}
	for i, want := range judged {
		if l.Table.Rows[i][7] != want {
			t.Errorf("lot %d is judged %q, want %q", i, l.Table.Rows[i][7], want)
		}
	}
	if l.Figure == nil || len(l.Figure.Points[0].List) != 4 || !strings.HasPrefix(l.Proposal, "House value stands") {
		t.Errorf("%s", l.Proposal)
	}
}

func TestLotsPropose(t *testing.T) {
	s, _ := lotsOf(t, "date,lot,resistance_per_length / mΩ/m,section / mm²,temperature / °C\n2026-01-01,A,51.0,10,20\n2026-02-01,B,51.1,10,20\n2026-03-01,C,50.9,10,20\n2026-04-01,D,51.0,10,20\n")
	if !strings.HasPrefix(s.Lots.Proposal, "Propose a change") || !strings.Contains(s.Lots.Proposal, "51.0") {
		t.Errorf("%s", s.Lots.Proposal)
	}
}
