package library

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
)

// TestDemo: the demo loads without an error, with the materials it promises.
func TestDemo(t *testing.T) {
	lib, err := Load("../..", Options{Parallel: 2})
	if err != nil {
		t.Fatal(err)
	}
	if n := place.Count(lib.Findings, place.Error); n > 0 {
		t.Errorf("%d errors: %v", n, lib.Findings)
	}
	real, invented := 0, 0
	for _, r := range lib.Materials {
		switch {
		case r.Invented:
			invented++
			if !strings.Contains(r.Name, "(invented)") || !strings.Contains(strings.ToLower(r.Notes), "invented") {
				t.Errorf("%s is invented and does not say so in name and notes", r.ID)
			}
		case r.Status != material.Withdrawn:
			real++
		}
		for _, c := range citations(r) {
			if lib.Source(c.ID) == nil {
				t.Errorf("%s cites %q", r.ID, c.ID)
			}
		}
	}
	if real < 32 || invented != 3 {
		t.Errorf("%d real and %d invented materials", real, invented)
	}
	if lib.Material("manganese-copper-strip") != lib.Material("cumn12ni") {
		t.Error("an earlier ID does not lead to the record")
	}
}

func citations(r *material.Record) []material.Citation {
	var list []material.Citation
	for _, s := range r.Sets {
		list = append(list, s.Source)
	}
	for _, p := range r.Properties {
		list = append(list, p.Source)
	}
	return list
}

const record = "name: X\nsource: s\nresistivity: 43 µΩ·cm\nreference_temperature: 20 °C\n"

func files(more map[string]string) map[string][]byte {
	m := map[string][]byte{"materials/sources.yaml": []byte("s: {kind: standard, title: T, number: N}\n"), "materials/x.yaml": []byte(record)}
	for name, text := range more {
		m[name] = []byte(text)
	}
	return m
}

func TestNames(t *testing.T) {
	for _, bad := range []string{"Copper", "a b", "-x", "x_y", "x.y", "con", "lpt1", "reference", "ü", strings.Repeat("x", 120)} {
		lib := FromFiles(files(map[string]string{"materials/" + bad + ".yaml": record}))
		if len(lib.Materials) != 1 || place.Count(lib.Findings, place.Error) != 1 {
			t.Errorf("%q: %d records, %v", bad, len(lib.Materials), lib.Findings)
		}
	}
	for _, good := range []string{"0", "cumn12ni", "a-b-c", "com", "com10"} {
		if lib := FromFiles(files(map[string]string{"materials/" + good + ".yaml": record})); len(lib.Materials) != 2 {
			t.Errorf("%q is refused: %v", good, lib.Findings)
		}
	}
}

// TestLinksOutside: a link that leaves the folder is refused with a finding.
func TestLinksOutside(t *testing.T) {
	dir := t.TempDir()
	folder := filepath.Join(dir, "reference")
	for name, text := range map[string]string{"outside.yaml": record, "reference/materials/sources.yaml": "s: {kind: standard, title: T, number: N}\n", "reference/materials/x.yaml": record} {
		file := filepath.Join(dir, name)
		os.MkdirAll(filepath.Dir(file), 0o755)
		if err := os.WriteFile(file, []byte(text), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	if err := os.Symlink("../../outside.yaml", filepath.Join(folder, "materials", "y.yaml")); err != nil {
		t.Skip("no links here:", err)
	}
	if err := os.Symlink("missing.yaml", filepath.Join(folder, "materials", "z.yaml")); err != nil {
		t.Fatal(err)
	}
	lib, err := Load(folder, Options{})
	if err != nil {
		t.Fatal(err)
	}
	if len(lib.Materials) != 1 || len(lib.Findings) != 2 {
		t.Fatalf("%d records, %v", len(lib.Materials), lib.Findings)
	}
	for _, f := range lib.Findings {
		if f.Code != "file-unreadable" || strings.Contains(f.Message, dir) {
			t.Errorf("%+v", f)
		}
	}
}

func TestMissing(t *testing.T) {
	if _, err := Load(t.TempDir(), Options{}); err == nil || !strings.Contains(err.Error(), "--folder") {
		t.Errorf("error %v", err)
	}
	if lib := FromFiles(map[string][]byte{"materials/x.yaml": []byte(record)}); len(lib.Materials) != 1 || lib.Findings[0].Code != "sources-missing" {
		t.Errorf("without sources: %v", lib.Findings)
	}
}

func TestOffers(t *testing.T) {
	head := strings.Join(offerColumns, ",") + "\n"
	lib := FromFiles(files(map[string]string{offersFile: "\ufeff" + head + "x,A,wire,1 mm,1.5,EUR,kg,1,2026-01-01,,,,,n\n"}))
	if len(lib.Offers) != 1 || lib.Offers[0].Supplier != "A" || lib.Offers[0].Position.Line != 2 {
		t.Errorf("%+v %v", lib.Offers, lib.Findings)
	}
	for _, bad := range []string{"a;b\n", head + "x,y\n", head + "\"x,A\n", ""} {
		if lib := FromFiles(files(map[string]string{offersFile: bad})); bad != "" && place.Count(lib.Findings, place.Error) == 0 {
			t.Errorf("%q is accepted", bad)
		}
	}
}

func TestDefaults(t *testing.T) {
	lib := FromFiles(files(nil))
	if lib.Settings.Title == "" || lib.Settings.Units.Resistivity != "µΩ·cm" || len(lib.Settings.Paper) != 2 {
		t.Errorf("%+v", lib.Settings)
	}
}

func BenchmarkLoadDemo(b *testing.B) {
	for b.Loop() {
		if _, err := Load("../..", Options{}); err != nil {
			b.Fatal(err)
		}
	}
}
