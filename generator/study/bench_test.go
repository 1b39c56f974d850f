package study

import (
	"fmt"
	"strings"
	"testing"

	"ohmfolio/generator/library"
)

// many makes n records of resistance alloys with everything that a study asks.
func many(n int, block string) *library.Library {
	files := map[string][]byte{
		"materials/sources.yaml": []byte("s: {kind: standard, title: T, number: N, checked: original}\n"),
		"content/reports/r.md":   []byte("# R\n\n```study: " + block + "\n```\n"),
	}
	for i := range n {
		files[fmt.Sprintf("materials/m%04d.yaml", i)] = []byte(fmt.Sprintf("name: M%d\nsource: s\nstatus: released\nbasis: resistance\nresistivity: %d µΩ·cm ± 5 %%\nreference_temperature: 20 °C\nalpha: %d ppm/K ± 5 ppm/K\nbeta: -0.4 ppm/K² ± 0.1 ppm/K²\nvalid_range: -55 °C to 155 °C\n"+
			"properties: {thermal_conductivity: {value: 22 W/(m·K), source: s}, emf_to_copper: {value: -1 µV/K, source: s}, density: {value: 8.4 g/cm³, source: s}, specific_heat: {value: 410 J/(kg·K), source: s}, service_temperature: {accuracy: 120 °C, source: s}}\n", i, 40+i%20, i%30))
	}
	return library.FromFiles(files)
}

func ids(n int) string {
	list := make([]string, n)
	for i := range list {
		list[i] = fmt.Sprintf("m%04d", i)
	}
	return strings.Join(list, ", ")
}

func benchmarkStudy(b *testing.B, n int, block string) {
	lib := many(n, block)
	if o, findings := Run(lib, lib.Documents[0].Page.Studies[0]); o == nil || len(o.Materials) < n {
		b.Fatal(findings)
	}
	for b.Loop() {
		Run(lib, lib.Documents[0].Page.Studies[0])
	}
}

func BenchmarkCompare1000(b *testing.B) {
	benchmarkStudy(b, 1000, "compare\nmaterials: ["+ids(1000)+"]\nwindow: -40 °C to 85 °C\nrequire: {greatest_change: 0.3 %}")
}

func BenchmarkChoose1000(b *testing.B) {
	benchmarkStudy(b, 1000, "choose\nwindow: -40 °C to 85 °C\nrequire: {greatest_change: 0.3 %, emf_to_copper: 5 µV/K}")
}

func BenchmarkShunt40By6(b *testing.B) {
	benchmarkStudy(b, 40, "shunt\nmaterials: ["+ids(40)+"]\ncurrent: 200 A\ndrop: 50 mV\nthickness: [0.5 mm, 0.8 mm, 1 mm, 1.5 mm, 2 mm, 3 mm]\nlength: 20 mm\nambient: -40 °C to 60 °C\nends: 60 °C\n"+
		"copper_share: 0.5 % to 1 %\nterminal_difference: 2 K\nsmallest_current: 2 A\noffset: 5 µV\ndrift: 0.05 %\ntolerance: 0.02 %\npeak_current: 2 kA\npeak_time: 0.1 s\nrequire: {greatest_change: 0.3 %, surface_load: 0.8 W/cm²}")
}

func BenchmarkShunt1000(b *testing.B) {
	benchmarkStudy(b, 1000, "shunt\nmaterials: ["+ids(1000)+"]\ncurrent: 200 A\ndrop: 50 mV\nthickness: 1 mm\nlength: 20 mm\nambient: -40 °C to 60 °C\nends: 60 °C\nrequire: {greatest_change: 0.3 %}")
}
