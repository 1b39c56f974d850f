package command

import (
	"bytes"
	"fmt"
	"math/rand"
	"os"
	"path/filepath"
	"testing"
)

// generated writes a reference of n records with two figures, limits, stock
// and properties each, the same for the same n.
func generated(b *testing.B, n int) string {
	b.Helper()
	dir := memoryFolder(b)
	if err := os.MkdirAll(filepath.Join(dir, "materials"), 0o755); err != nil {
		b.Fatal(err)
	}
	random := rand.New(rand.NewSource(1))
	write := func(name, text string) {
		if err := os.WriteFile(filepath.Join(dir, "materials", name), []byte(text), 0o644); err != nil {
			b.Fatal(err)
		}
	}
	write("sources.yaml", "standard: {kind: standard, title: A standard, number: X 1, checked: original}\n")
	for i := range n {
		write(fmt.Sprintf("alloy-%05d.yaml", i), fmt.Sprintf(`name: Generated alloy %d
family: resistance alloys
composition: {Cu: balance, Ni: 44 %%}
status: released
revision: 1
sign_off: {author: a desk, reviewer: another desk, date: 2026-01-01, reason: generated, due: 2028-01-01}
class: specified
condition: annealed
basis: resistance
resistivity: %.2f µΩ·cm ± 5 %%
alpha: %.2f ppm/K ± 10 ppm/K
beta: %.3f ppm/K²
reference_temperature: 20 °C
valid_range: -40 °C to 125 °C
source: standard
properties:
  density: {value: 8.9 g/cm³, at: 20 °C, source: standard}
  expansion: {value: 16e-6 /K, window: 20 °C to 100 °C, source: standard}
  emf_to_copper: {value: -40 µV/K, window: 0 °C to 100 °C, source: standard}
  thermal_conductivity: {value: 22 W/(m·K), source: standard}
stock:
  - {form: wire, diameter: 0.40 mm ± 0.008 mm}
  - {form: strip, thickness: 1 mm ± 0.02 mm, width: 200 mm}
`, i, 40+10*random.Float64(), 60*random.Float64()-30, -random.Float64()))
	}
	return dir
}

// memoryFolder is a folder in memory where the system has one.
func memoryFolder(b *testing.B) string {
	if _, err := os.Stat("/dev/shm"); err != nil {
		return b.TempDir()
	}
	dir, err := os.MkdirTemp("/dev/shm", "ohmfolio-bench-")
	if err != nil {
		b.Fatal(err)
	}
	b.Cleanup(func() { os.RemoveAll(dir) })
	return dir
}

func benchmarkPublish(b *testing.B, folder string) {
	into := memoryFolder(b)
	for b.Loop() {
		b.StopTimer()
		os.RemoveAll(into)
		b.StartTimer()
		var out, errs bytes.Buffer
		if code := Run([]string{"publish", "--folder", folder, "--into", into}, &out, &errs); code != 0 {
			b.Fatal(errs.String())
		}
	}
}

// BenchmarkPublishDemo publishes the demo from nothing. Target: 0.3 s.
func BenchmarkPublishDemo(b *testing.B) { benchmarkPublish(b, "../..") }

// BenchmarkPublish2000 publishes 2,000 generated materials from nothing.
// Target: 2.5 s on two cores.
func BenchmarkPublish2000(b *testing.B) { benchmarkPublish(b, generated(b, 2000)) }

// BenchmarkChanges2000 compares two references of 2,000 materials in which
// every α differs, from folders and from editions. Target: under 3 s.
func BenchmarkChanges2000(b *testing.B) {
	old, now := generated(b, 2000), generated(b, 2000)
	files, err := filepath.Glob(filepath.Join(now, "materials", "alloy-*.yaml"))
	if err != nil {
		b.Fatal(err)
	}
	for _, file := range files {
		text, err := os.ReadFile(file)
		if err != nil {
			b.Fatal(err)
		}
		if err := os.WriteFile(file, bytes.Replace(text, []byte(" ppm/K ± 10 ppm/K"), []byte("1 ppm/K ± 10 ppm/K"), 1), 0o644); err != nil {
			b.Fatal(err)
		}
	}
	for _, folder := range []string{old, now} {
		var out, errs bytes.Buffer
		if code := Run([]string{"publish", "--folder", folder, "--into", filepath.Join(folder, "public"), "--edition", "2026-06"}, &out, &errs); code != 0 {
			b.Fatal(errs.String())
		}
	}
	edition := filepath.Join("materials", "editions", "2026-06.json")
	for _, c := range []struct{ name, old, now string }{
		{"folders", old, now}, {"sites", filepath.Join(old, "public"), filepath.Join(now, "public")}, {"editions", filepath.Join(old, edition), filepath.Join(now, edition)},
	} {
		b.Run(c.name, func(b *testing.B) {
			for b.Loop() {
				var out, errs bytes.Buffer
				if code := Run([]string{"changes", c.old, c.now}, &out, &errs); code != 0 || !bytes.Contains(out.Bytes(), []byte("2000 changed")) {
					b.Fatal(errs.String())
				}
			}
		})
	}
}
