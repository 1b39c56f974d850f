package place

import (
	"strings"
	"testing"
)

func printed(t *testing.T, o PrintOptions, findings ...Finding) string {
	t.Helper()
	var b strings.Builder
	if err := Print(&b, findings, o); err != nil {
		t.Fatal(err)
	}
	return b.String()
}

func TestPrint(t *testing.T) {
	src := NewSource("materials/x.yaml", []byte("\ufeffname: X\r\n\tρ: 43 銅 bad\n"))
	l := List{Source: src}
	f := l.Add("unit-unknown", Error, src.At(2, 10, 3), "“bad” is no unit", "write µΩ·cm")
	f.Also = &Also{src.At(1, 1, 4), "the name stands here"}
	want := "materials/x.yaml:2:10: error: “bad” is no unit [unit-unknown]\n" +
		"    \tρ: 43 銅 bad\n" +
		"    \t        ^^^\n" +
		"    materials/x.yaml:1:1: the name stands here\n" +
		"    mend: write µΩ·cm\n"
	if got := printed(t, PrintOptions{}, l.Findings...); got != want {
		t.Errorf("got\n%s\nwant\n%s", got, want)
	}
	if got := printed(t, PrintOptions{Color: true}, l.Findings...); !strings.Contains(got, "\x1b[31merror\x1b[0m") {
		t.Errorf("no colour: %q", got)
	}
	if got := printed(t, PrintOptions{}, Finding{Code: "x", Severity: Note, Message: "m"}); got != "note: m [x]\n" {
		t.Errorf("without a place: %q", got)
	}
	if src.Line(1) != "name: X" || src.Line(3) != "" || src.Line(0) != "" || src.Line(9) != "" {
		t.Error("lines are not told right")
	}
}

func TestGroup(t *testing.T) {
	var list []Finding
	for i := range 6 {
		list = append(list, Finding{Code: "c", Severity: Warning, Message: "m", Mend: "do it", Position: Position{File: "f", Line: i + 1}})
	}
	got := printed(t, PrintOptions{Group: true}, list...)
	if strings.Count(got, "warning") != 1 || !strings.Contains(got, "and 5 more of this kind: f:2, f:3, f:4, …") {
		t.Errorf("grouped: %q", got)
	}
	if got := printed(t, PrintOptions{Group: true}, list[:3]...); strings.Count(got, "warning") != 3 {
		t.Errorf("three are told apart: %q", got)
	}
}

func TestSort(t *testing.T) {
	list := []Finding{{Code: "b", Position: Position{File: "b", Line: 1}}, {Code: "a", Position: Position{File: "a", Line: 2}}, {Code: "a", Position: Position{File: "a", Line: 1, Column: 2}}, {Code: "c", Position: Position{File: "a", Line: 1, Column: 1}}}
	Sort(list)
	order := ""
	for _, f := range list {
		order += f.Code
	}
	if order != "caab" {
		t.Errorf("order %s", order)
	}
}

func TestNear(t *testing.T) {
	known := []string{"resistivity", "reference_temperature", "alpha", "table"}
	for word, want := range map[string]string{"resistvity": "resistivity", "resitsivity": "resistivity", "alhpa": "alpha", "tabel": "table", "gamma": "", "x": "", "zzz": "", "refernce_temperatur": "reference_temperature"} {
		if got := Near(word, known); got != want {
			t.Errorf("near %q is %q, want %q", word, got, want)
		}
	}
}
