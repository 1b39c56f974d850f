package command

import (
	"encoding/json"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"
)

// TestFitRaw goes through the command with the NIST StRD sets.
func TestFitRaw(t *testing.T) {
	for name, degree := range map[string]string{"norris": "1", "pontius": "2", "wampler2": "5", "noint1": "1"} {
		var c struct {
			Intercept bool `json:"intercept"`
			Certified struct {
				Parameters []struct{ Estimate string } `json:"parameters"`
			} `json:"certified"`
		}
		text, err := os.ReadFile("../fit/testdata/" + name + ".json")
		if err != nil {
			t.Fatal(err)
		}
		if err := json.Unmarshal(text, &c); err != nil {
			t.Fatal(err)
		}
		args := []string{"fit", "../fit/testdata/" + name + ".csv", "--raw", "--degree", degree, "--format", "json"}
		if !c.Intercept {
			args = append(args, "--through-origin")
		}
		code, out, errs := run(args...)
		if code != 0 {
			t.Fatal(errs)
		}
		m := object(t, out)
		wantFields(t, m, "reference_C degree n dof coefficients covariance correlation residual_sd r_squared lack_of_fit largest_residual_ppm outliers")
		for i, p := range c.Certified.Parameters {
			got := m["coefficients"].([]any)[i].(map[string]any)
			want, _ := strconv.ParseFloat(p.Estimate, 64)
			if math.Abs(got["value"].(float64)/want-1) > 1e-11 {
				t.Errorf("%s: %v, certified %s", name, got, p.Estimate)
			}
		}
	}
}

// TestFitToRecord: points made from α = 3.1 ppm/K and β = −0.46 ppm/K² about
// 25 °C with small scatter come back within their stated uncertainties, and
// the YAML is a data set that the program reads.
func TestFitToRecord(t *testing.T) {
	csv := "temperature / °C,resistivity / µΩ·cm\n"
	for i := range 12 {
		c := -40 + 12*float64(i)
		d := c - 25
		csv += strconv.FormatFloat(c, 'f', 1, 64) + "," + strconv.FormatFloat(43.6*(1+3.1e-6*d-0.46e-6*d*d)+1e-4*float64(i%3-1), 'f', 6, 64) + "\n"
	}
	file := filepath.Join(t.TempDir(), "points.csv")
	os.WriteFile(file, []byte(csv), 0o644)
	code, out, errs := run("fit", file, "--reference", "25 °C", "--degree", "2", "--format", "json")
	if code != 0 {
		t.Fatal(errs)
	}
	for i, want := range []float64{43.6e-8, 3.1e-6, -0.46e-6} {
		c := object(t, out)["coefficients"].([]any)[i].(map[string]any)
		if v, u := c["value"].(float64), c["standard_uncertainty"].(float64); math.Abs(v-want) > 3*u || u == 0 {
			t.Errorf("%v, made from %g", c, want)
		}
	}
	_, yaml, _ := run("fit", file, "--reference", "25 °C", "--degree", "2", "--format", "yaml")
	record := "name: X\nadopt: measured\ndata_sets:\n" + strings.NewReplacer("SOURCE-ID", "standard", "CONDITION", "as received").Replace(yaml)
	dir := reference(t, map[string]string{"materials/sources.yaml": sources, "materials/x.yaml": record})
	if code, out, errs := run("value", "x", "resistivity", "--at", "25 °C", "--folder", dir, "--format", "json"); code != 0 || object(t, out)["uncertainty"] == nil {
		t.Errorf("the pasted data set: %d %s\n%s\n%s", code, out, errs, record)
	}
	_, text, _ := run("fit", file, "--reference", "25 °C", "--degree", "2", "--thermometer", "0.05 K", "--instrument", "0.01 %")
	if !strings.Contains(text, "thermometer") || !strings.Contains(text, "instrument") || !strings.Contains(text, "(k=") {
		t.Errorf("text:\n%s", text)
	}
}

func TestFitMistakes(t *testing.T) {
	file := filepath.Join(t.TempDir(), "points.csv")
	os.WriteFile(file, []byte("temperature;resistance\n20;1\n"), 0o644)
	for _, c := range []struct {
		args string
		code int
		says string
	}{
		{file + " --reference 20degC", 1, "commas between columns"},
		{file, 2, "--reference"},
		{file + " --reference 20degC --degree 4", 2, "1, 2 or 3"},
		{file + "x --reference 20degC", 1, "cannot be read"},
		{file + " --raw --reference 20degC", 2, "bare number"},
		{file + " --through-origin --reference 20degC", 2, "--raw"},
	} {
		code, out, errs := run(append([]string{"fit"}, strings.Fields(c.args)...)...)
		if code != c.code || out != "" || !strings.Contains(errs, c.says) {
			t.Errorf("%s: exit %d, %q, %q", c.args, code, out, errs)
		}
	}
}
