package changes

import (
	"encoding/json"
	"fmt"
	"regexp"
	"sort"
	"strings"
	"testing"

	"gopkg.in/yaml.v3"

	"ohmfolio/generator/library"
	"ohmfolio/generator/place"
)

// fullRecords hold, between them, every key that a record may have.
var fullRecords = []string{
	`name: Full
family: resistance alloys
formerly: [older]
designations: {short: F, number: "2.1"}
composition: {Cu: balance, Ni: 44 %}
applies_to: strip
not_for: wire
notes: A remark.
invented: yes
status: withdrawn
replaced_by: x
withdrawn_reason: replaced
revision: 2
sign_off: {author: a desk, reviewer: b desk, date: 2026-05-04, reason: first issue, due: 2028-05-04}
adopt: line
data_sets:
  line: {source: {id: s, where: table 1, checked: {against: original, date: 2026-01-02, by: c desk}}, class: specified, condition: annealed, basis: "resistivity, uncorrected", dimensions_at: 20 °C, temperature_scale: ITS-90, resistivity: 49 µΩ·cm ± 5 %, alpha: 10 ppm/K ± 2 ppm/K, beta: -0.5 ppm/K² ± 0.1 ppm/K² (k=2), gamma: 1e-9 /K³, reference_temperature: 20 °C, valid_range: 0 °C to 100 °C}
  clean: {source: {id: s, checked: transcription}, basis: resistance, conductivity: 2.0 MS/m, reference_temperature: 20 °C, chord: {value: 20 ppm/K, from: 20 °C, to: 60 °C}}
  table: {source: s, basis: resistivity, table: {temperature: K, resistivity: µΩ·cm, each_row: ± 0.5 %, rows: [[300, 49.1], [350, 49.2], [400, 49.4]], interpolate: linear}}
  conducts: {source: s, basis: resistivity, table: {temperature: °C, conductivity: MS/m, rows: [[20, 2.04], [100, 2.03]]}}
  factors: {source: s, basis: resistance, resistivity: 49 µΩ·cm, reference_temperature: 20 °C, table: {temperature: °C, resistance_ratio: "1", rows: [[20, 1], [100, 1.01]]}}
  wire: {source: s, basis: resistance, reference_temperature: 0 °C, callendar_van_dusen: {A: 3.9083e-3 /°C, B: -5.775e-7 /°C², C: -4.183e-12 /°C⁴}, valid_range: -50 °C to 100 °C, tolerance_classes: [{name: A, at_zero: 0.15 K, per_degree: 0.002, window: -50 °C to 100 °C}]}
  cold: {source: s, basis: resistivity, bloch_gruneisen: {residual: 0.002 µΩ·cm, debye_temperature: 328 K, amplitude: 7.81 µΩ·cm, exponent: 5}, valid_range: 4 K to 100 K}
  points: {source: s, class: measured, basis: resistance, points: points.csv, fit: {reference_temperature: 25 °C, degree: 2}, specimen: {between_taps: 200.00 mm ± 0.05 mm (k=2), width: 10.02 mm ± 0.02 mm (k=2), thickness: 1.004 mm ± 0.004 mm (k=2), bridge: 0 % ± 0.01 % (k=2), thermometer: 0 K ± 0.04 K (k=2), at: 23 °C}, valid_range: 0 °C to 100 °C}
  round: {source: s, class: measured, basis: resistance, points: points.csv, fit: {reference_temperature: 25 °C, degree: 1}, specimen: {between_taps: 200.00 mm ± 0.05 mm (k=2), diameter: 2.00 mm ± 0.02 mm (k=2)}, valid_range: 0 °C to 100 °C}
  weighed: {source: s, class: measured, basis: resistance, points: points.csv, fit: {reference_temperature: 25 °C, degree: 1}, specimen: {between_taps: 200.00 mm ± 0.05 mm (k=2), mass: 21.30 g ± 0.02 g (k=2), length: 1000 mm ± 1 mm (k=2)}, valid_range: 0 °C to 100 °C}
tcr_limits: [{measure: box, reference_temperature: 20 °C, window: 20 °C to 60 °C, from: -10 ppm/K, to: 10 ppm/K, class_name: "1", source: s}]
properties:
  density: {value: 8.9 g/cm³ ± 0.1 g/cm³, at: 20 °C, class: typical, condition: cast, source: s, note: a note}
  expansion: {value: 17e-6 /K, window: 20 °C to 100 °C, class: typical, condition: cast, source: {id: s, where: p. 1, checked: transcription}, note: a note}
  emf_to_copper: {value: -40 µV/K, at: 20 °C, window: 0 °C to 100 °C, class: typical, condition: cast, source: s, note: a note}
  thermal_conductivity: {value: 22 W/(m·K), source: s}
  specific_heat: {value: 410 J/(kg·K), source: s}
  melting_temperature: {value: 960 °C to 1020 °C, source: s}
  tensile_strength: {value: ">= 390 MPa", source: s}
  elongation: {value: ">= 20 %", source: s}
  service_temperature: {accuracy: 60 °C, continuous: 140 °C, class: typical, condition: in air, source: s, note: a note}
stock:
  - {form: strip, thickness: 1 mm ± 0.02 mm, width: 200 mm, note: a note, source: s}
  - {form: wire, diameter: 0.40 mm, resistance: 3.42 Ω/m ± 5 %}
  - {form: wire, gauge: AWG 24}
equivalents: [{designation: C1, system: UNS, record: x, verdict: near, use: bus bars, reason: harder, source: s, date: 2026-05-04, sign_off: {author: a desk, reviewer: b desk, date: 2026-05-04, reason: asked, due: 2028-05-04}}]
declarations: [{substance: lead, number: "7439-92-1", limit: 0.1 %, greatest: <= 0.02 %, basis: per article, exemption: 6(c), expires: 2027-07-21, document: paper 12, date: 2026-03-02, note: a note}]
lots: lots.csv
`,
	"name: By mass\nsource: s\nmass_resistivity: 0.15328 Ω·g/m²\nbasis: resistance\nreference_temperature: 20 °C\nproperties:\n  density: {value: 8.89 g/cm³, source: s}\n",
	"name: A foil\nsource: s\nsheet_resistance: 0.86 mΩ/□\nthickness: 0.5 mm\nbasis: resistance\nreference_temperature: 20 °C\n",
	"name: Pieces\nadopt: joined\ndata_sets:\n" +
		"  cold: {source: s, basis: resistivity, table: {temperature: K, resistivity: µΩ·cm, rows: [[100, 1], [200, 2]]}}\n" +
		"  warm: {source: s, basis: resistivity, table: {temperature: K, resistivity: µΩ·cm, rows: [[200, 2], [300, 3]]}}\n" +
		"  also-warm: {source: s, basis: resistivity, table: {temperature: K, resistivity: µΩ·cm, rows: [[200, 2], [300, 4]]}}\n" +
		"  also-cold: {source: s, basis: resistivity, table: {temperature: K, resistivity: µΩ·cm, rows: [[100, 1.1], [200, 2]]}}\n" +
		"  joined: {source: s, basis: resistivity, pieces: [cold, warm]}\n",
}

// fixed are values of these records that can have no other one.
var fixed = map[string]string{
	"data_sets.factors.table.temperature":      "the factor must be 1 at the reference temperature",
	"data_sets.factors.table.resistance_ratio": "a ratio has the unit 1",
	"data_sets.factors.table.rows":             "the factor must be 1 at the reference temperature",
	"data_sets.wire.reference_temperature":     "the coefficients are told about 0 °C",
	"data_sets.cold.table.rows":                "pieces must join",
	"data_sets.warm.table.rows":                "pieces must join",
	"data_sets.cold.table.resistivity":         "pieces must join",
	"data_sets.warm.table.resistivity":         "pieces must join",
	"data_sets.cold.table.temperature":         "pieces must join",
	"data_sets.warm.table.temperature":         "pieces must join",
}

// keeping are the keys of record keeping: outside the fingerprint.
var keeping = regexp.MustCompile(`^(status|revision|sign_off|formerly|replaced_by|withdrawn_reason|lots)\b|\bsign_off\b|\.(date|by|expires)$`)

// other are texts that name something: what else they can name.
var other = map[string][]string{"adopt": {"clean", "cold"}, "pieces": {"also-cold", "also-warm"}, "gauge": {"AWG 25"}, "points": {"other.csv"}, "lots": {"other-lots.csv"}, "basis": {"resistance"},
	"temperature": {"°C", "K"}, "resistivity": {"mΩ·m", "µΩ·m"}, "conductivity": {"S/m"}, "exponent": {"3"}}

func loaded(text string) *library.Library {
	var points strings.Builder
	points.WriteString("temperature / °C,resistance / µΩ,uncertainty_T / K\n")
	for i := range 15 {
		fmt.Fprintf(&points, "%d,%.4f,0.02\n", 10*i-10, 868.9+0.003*float64(i*i%7)+0.03*float64(i))
	}
	lots := "date,lot,resistivity / µΩ·cm,temperature / °C,U / %,supplier\n2025-02-11,0431,107.6,23.0,0.5,Supplier\n"
	return library.FromFiles(map[string][]byte{"materials/sources.yaml": []byte(sources), "materials/full.yaml": []byte(text),
		"materials/points.csv": []byte(points.String()), "materials/other.csv": []byte(points.String()), "materials/lots.csv": []byte(lots), "materials/other-lots.csv": []byte(lots)})
}

// fingerprintOf is "" when the record cannot be read.
func fingerprintOf(lib *library.Library) string {
	if place.Count(lib.Findings, place.Error) > 0 || len(lib.Materials) != 1 {
		return ""
	}
	return lib.Materials[0].Fingerprint
}

// scalars are the values of a YAML tree with their paths, in order.
func scalars(n *yaml.Node, path string, visit func(path string, n *yaml.Node)) {
	switch n.Kind {
	case yaml.MappingNode:
		for i := 0; i+1 < len(n.Content); i += 2 {
			scalars(n.Content[i+1], strings.TrimPrefix(path+"."+n.Content[i].Value, "."), visit)
		}
	case yaml.SequenceNode:
		for _, c := range n.Content {
			scalars(c, path, visit)
		}
	case yaml.ScalarNode:
		visit(path, n)
	}
}

// variants are other values that may stand where v stands: another digit,
// another word that the schema allows, a longer text.
func variants(path, v string, words map[string][]string) []string {
	list := append([]string{}, other[path[strings.LastIndexByte(path, '.')+1:]]...)
	list = append(list, words[plainPath(path)]...)
	for i := len(v) - 1; i >= 0; i-- {
		if v[i] >= '0' && v[i] <= '9' {
			for _, d := range "123456789" {
				list = append(list, v[:i]+string(d)+v[i+1:])
			}
		}
	}
	list = append(list, map[string]string{"yes": "no"}[v], v+" more")
	var out []string
	for _, s := range list {
		if s != "" && s != v {
			out = append(out, s)
		}
	}
	return out
}

var freeName = regexp.MustCompile(`^(data_sets|designations|composition)\.[^.]+`)

// plainPath leaves out names that the author chose: the keys of a data set are
// the same at the top of a record.
func plainPath(path string) string {
	path = freeName.ReplaceAllString(path, "$1.*")
	return strings.TrimPrefix(path, "data_sets.*.")
}

// schemaPaths walks the record's JSON Schema: every key, and the words that
// may stand there.
func schemaPaths(t *testing.T) map[string][]string {
	t.Helper()
	schemas, err := library.Schemas()
	if err != nil {
		t.Fatal(err)
	}
	var root map[string]any
	if err := json.Unmarshal(schemas["record.schema.json"], &root); err != nil {
		t.Fatal(err)
	}
	paths := map[string][]string{}
	var walk func(path string, s map[string]any)
	walk = func(path string, s map[string]any) {
		properties, _ := s["properties"].(map[string]any)
		for k, v := range properties {
			walk(strings.TrimPrefix(path+"."+k, "."), v.(map[string]any))
		}
		for _, k := range []string{"items", "additionalProperties"} {
			if v, ok := s[k].(map[string]any); ok {
				if k == "items" {
					walk(path, v)
				} else {
					walk(path+".*", v)
				}
			}
		}
		either, _ := s["anyOf"].([]any)
		for _, v := range either {
			walk(path, v.(map[string]any))
		}
		if len(properties) == 0 && len(either) == 0 && s["items"] == nil && s["additionalProperties"] == nil {
			path = plainPath(path)
			words := paths[path]
			list, _ := s["enum"].([]any)
			for _, w := range list {
				words = append(words, fmt.Sprint(w))
			}
			paths[path] = words
		}
	}
	walk("", root)
	return paths
}

// TestEveryKey changes every value of every key. What a sheet states alters
// the fingerprint, and the comparison tells it; record keeping does neither.
func TestEveryKey(t *testing.T) {
	paths := schemaPaths(t)
	seen := map[string]bool{}
	for _, text := range fullRecords {
		base := loaded(text)
		was := fingerprintOf(base)
		if was == "" {
			t.Fatalf("%v in\n%s", base.Findings, text)
		}
		old := Freeze(base, nil, "")
		count := 0
		eachScalar(t, text, func(int, string, *yaml.Node) { count++ })
		for i := range count {
			path, now := altered(t, text, i, paths)
			seen[plainPath(path)] = true
			if now == nil && fixed[path] == "" {
				t.Errorf("%s: no other value can be read", path)
			}
			if now == nil {
				continue
			}
			isKeeping := keeping.MatchString(path)
			if got := fingerprintOf(now); (got == was) != isKeeping {
				t.Errorf("%s: the fingerprint was %s and is %s", path, was, got)
			}
			r := Compare(old, Freeze(now, nil, ""), "old", "new")
			if r.Same != isKeeping {
				t.Errorf("%s: the comparison says no change of meaning: %v", path, r.Same)
			}
		}
	}
	var missing []string
	for p := range paths {
		if !seen[p] && !strings.Contains(p, ".*.source.") {
			missing = append(missing, p)
		}
	}
	sort.Strings(missing)
	for _, p := range missing {
		if !inherited(p, seen) {
			t.Errorf("no record of this test has the key %s", p)
		}
	}
}

// inherited tells whether a key is one that many shapes share, seen in
// another one: a citation, or what properties have in common.
func inherited(path string, seen map[string]bool) bool {
	rest, ok := strings.CutPrefix(path, "properties.")
	if ok {
		_, rest, _ = strings.Cut(rest, ".")
		for _, p := range []string{"density", "expansion", "emf_to_copper"} {
			if seen["properties."+p+"."+rest] {
				return true
			}
		}
	}
	i := strings.LastIndex(path, "source.")
	return i >= 0 && seen[path[i:]]
}

func eachScalar(t *testing.T, text string, visit func(i int, path string, n *yaml.Node)) *yaml.Node {
	t.Helper()
	var doc yaml.Node
	if err := yaml.Unmarshal([]byte(text), &doc); err != nil {
		t.Fatal(err)
	}
	i := 0
	scalars(doc.Content[0], "", func(path string, n *yaml.Node) { visit(i, path, n); i++ })
	return &doc
}

// altered is the record with scalar number i replaced by the first variant
// that can be read; nil when none can.
func altered(t *testing.T, text string, i int, words map[string][]string) (path string, lib *library.Library) {
	t.Helper()
	var list []string
	eachScalar(t, text, func(j int, p string, n *yaml.Node) {
		if j == i {
			path, list = p, variants(p, n.Value, words)
		}
	})
	for _, v := range list {
		doc := eachScalar(t, text, func(j int, _ string, n *yaml.Node) {
			if j == i {
				n.Value = v
			}
		})
		out, err := yaml.Marshal(doc)
		if err != nil {
			t.Fatal(err)
		}
		if lib := loaded(string(out)); fingerprintOf(lib) != "" {
			return path, lib
		}
	}
	return path, nil
}

// TestEveryKeyReformatted writes the same records by another program: block
// style, keys in reverse, other quotes. They mean the same.
func TestEveryKeyReformatted(t *testing.T) {
	for _, text := range fullRecords {
		var doc yaml.Node
		if err := yaml.Unmarshal([]byte(text), &doc); err != nil {
			t.Fatal(err)
		}
		turn(doc.Content[0])
		out, err := yaml.Marshal(&doc)
		if err != nil {
			t.Fatal(err)
		}
		a, b := loaded(text), loaded("# written again\n"+string(out))
		if was, is := fingerprintOf(a), fingerprintOf(b); was == "" || was != is {
			t.Errorf("the fingerprint was %s and is %s: %v\n%s", was, is, b.Findings, out)
		}
		if r := Compare(Freeze(a, nil, ""), Freeze(b, nil, ""), "old", "new"); !r.Same || r.Materials[0].Change != Unchanged {
			t.Error(r.Text())
		}
	}
}

// turn reverses the keys of every mapping and puts everything in block style;
// texts that were quoted stay so.
func turn(n *yaml.Node) {
	if n.Kind != yaml.ScalarNode {
		n.Style = 0
	}
	if n.Kind == yaml.MappingNode {
		for i, j := 0, len(n.Content)-2; i < j; i, j = i+2, j-2 {
			n.Content[i], n.Content[j] = n.Content[j], n.Content[i]
			n.Content[i+1], n.Content[j+1] = n.Content[j+1], n.Content[i+1]
		}
	}
	for _, c := range n.Content {
		turn(c)
	}
}
