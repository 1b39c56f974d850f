package export

import (
	"bytes"
	"encoding/csv"
	"encoding/json"
	"math"
	"strconv"
	"strings"
	"testing"

	"ohmfolio/generator/library"
	"ohmfolio/generator/statement"
)

func written(t *testing.T) (*library.Library, map[string]string) {
	t.Helper()
	lib, err := library.Load("../..", library.Options{})
	if err != nil {
		t.Fatal(err)
	}
	files := map[string]string{}
	for _, o := range Outputs(lib) {
		var b bytes.Buffer
		if err := o.Write(&b); err != nil {
			t.Fatal(err)
		}
		files[o.Path] = b.String()
	}
	return lib, files
}

// TestContract: the names of data/ID.json.
func TestContract(t *testing.T) {
	_, files := written(t)
	var m map[string]any
	if err := json.Unmarshal([]byte(files["data/copper-annealed.json"]), &m); err != nil {
		t.Fatal(err)
	}
	has(t, m, "id name status revision fingerprint data_sets segments")
	has(t, m["data_sets"].([]any)[0].(map[string]any), "name adopted model basis class condition checked reference_C resistivity_ohm_m alpha_per_K beta_per_K2 gamma_per_K3 limits valid_range_C source")
	s := m["segments"].(map[string]any)
	has(t, s, "resistivity_ohm_m resistance_ratio")
	has(t, s["resistance_ratio"].(map[string]any), "reference_K pieces")
	has(t, s["resistivity_ohm_m"].([]any)[0].(map[string]any), "from_K to_K centre_K c")
}

func has(t *testing.T, m map[string]any, names string) {
	t.Helper()
	for _, n := range strings.Fields(names) {
		if _, ok := m[n]; !ok {
			t.Errorf("the field %s is missing", n)
		}
	}
}

// TestNumbersAgree: every row of every CSV is what the program answers, and
// what the segments of the JSON give, to 1e-9 relative.
func TestNumbersAgree(t *testing.T) {
	lib, files := written(t)
	for _, r := range lib.Materials {
		text := files["data/"+r.ID+".csv"]
		for i := range len(text) {
			if text[i] >= 0x80 {
				t.Fatalf("%s: a byte that is not ASCII", r.ID)
			}
		}
		rows, err := csv.NewReader(strings.NewReader(text)).ReadAll()
		if err != nil || strings.Join(rows[0], ",") != strings.Join(csvHeads, ",") {
			t.Fatalf("%s: %v", r.ID, err)
		}
		var m MaterialJSON
		if err := json.Unmarshal([]byte(files["data/"+r.ID+".json"]), &m); err != nil {
			t.Fatal(err)
		}
		for _, row := range rows[1:] {
			c, err := strconv.ParseFloat(row[5], 64)
			if err != nil || row[3] != r.Fingerprint {
				t.Fatalf("%s: row %v", r.ID, row)
			}
			if row[6] == "" {
				continue
			}
			rho, _ := strconv.ParseFloat(row[6], 64)
			a, err := statement.Ask(lib, r, statement.Question{Quantity: statement.AskResistivity, At: c + 273.15, Unit: "Ω·m"})
			if err != nil || math.Abs(*a.Value/rho-1) > 1e-9 {
				t.Errorf("%s at %g °C: CSV %g, answer %v %v", r.ID, c, rho, a.Value, err)
			}
			if v := fromSegments(m.Segments.Resistivity, c+273.15); math.Abs(v/rho-1) > 1e-9 {
				t.Errorf("%s at %g °C: CSV %g, segments %g", r.ID, c, rho, v)
			}
		}
	}
}

func fromSegments(list []SegmentJSON, t float64) float64 {
	for i, s := range list {
		if t <= s.ToK+1e-9 || i == len(list)-1 {
			d := t - s.CentreK
			return s.C[0] + d*(s.C[1]+d*(s.C[2]+d*s.C[3]))
		}
	}
	return math.NaN()
}

// TestCSVW: the description names every CSV and every column.
func TestCSVW(t *testing.T) {
	_, files := written(t)
	var d csvwTables
	if err := json.Unmarshal([]byte(files["data/csv-metadata.json"]), &d); err != nil {
		t.Fatal(err)
	}
	for _, table := range d.Tables {
		if _, ok := files["data/"+table.URL]; !ok {
			t.Errorf("%s is described and not written", table.URL)
		}
		if table.TableSchema != "" {
			describedBy(t, files, table)
		}
	}
	var names []string
	for _, c := range d.TableSchema.Columns {
		names = append(names, c.Titles)
	}
	if strings.Join(names, ",") != strings.Join(csvHeads, ",") {
		t.Errorf("columns %v", names)
	}
}

// describedBy: the columns that a table has are those of its description.
func describedBy(t *testing.T, files map[string]string, table csvwTable) {
	t.Helper()
	var s csvwSchema
	if err := json.Unmarshal([]byte(files["data/"+table.TableSchema]), &s); err != nil {
		t.Fatalf("%s: %v", table.TableSchema, err)
	}
	var names []string
	for _, c := range s.Columns {
		names = append(names, c.Titles)
	}
	if head, _, _ := strings.Cut(files["data/"+table.URL], "\r\n"); head != strings.Join(names, ",") {
		t.Errorf("%s has %s", table.URL, head)
	}
}
