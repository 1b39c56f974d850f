package browser

import (
	"encoding/json"
	"fmt"
	"math/rand"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/chromedp/chromedp"

	"ohmfolio/generator/quantity"
)

// reading is one text and what it was read as; Value is nil for a range.
type reading struct {
	Kind, Text string
	Problem    string
	Value      *float64
	Limits     []float64
}

// TestReaderParity: the browser's reader reads every spelling of every unit as
// the program does, and of texts made by accident it reads none that the
// program refuses. It may refuse more: (k=2), +8/-4 and stated limits are for
// records, not for fields.
func TestReaderParity(t *testing.T) {
	table, err := quantity.Script()
	if err != nil {
		t.Fatal(err)
	}
	var units struct {
		Kinds map[quantity.Kind][]struct {
			S string
			N []string
		}
	}
	if err := json.Unmarshal(table, &units); err != nil {
		t.Fatal(err)
	}
	var list []reading
	must := map[string]bool{} // texts that both must read
	for _, k := range quantity.Kinds() {
		for _, u := range units.Kinds[k] {
			for _, spelled := range append(u.N, u.S) {
				for _, form := range []string{"1 ", "-2.5 ", "0.5\u202f", "1e-3 ", "1.5×10⁻⁸ ", "−4 ", "68", "1.5 x 10^-8 ", "50\u00a0"} {
					r := reading{Kind: string(k), Text: form + spelled}
					_, p := quantity.Parse(k, r.Text)
					must[r.Kind+r.Text] = p == nil
					list = append(list, r)
				}
			}
		}
	}
	for _, text := range []string{"-40 to 85 °C", "20 °C to 60 °C", "0 °F to 100 °C", "20 °C ± 2 K", "68 °F", "<= 40 °C"} {
		must["temperature"+text] = true
		list = append(list, reading{Kind: "temperature", Text: text})
	}
	for _, text := range []string{"±20 ppm/K", "± 0.02 %/K", "+/- 20 ppm/degC", "-4 to 8 ppm/K"} {
		must["temperature coefficient"+text] = true
		list = append(list, reading{Kind: "temperature coefficient", Text: text})
	}
	list = append(list, accidents(2000)...)
	if len(list) < 5000 {
		t.Fatalf("only %d texts", len(list))
	}
	got := readInBrowser(t, table, list)
	for i, r := range list {
		q, p := quantity.Parse(quantity.Kind(r.Kind), r.Text)
		switch b := got[i]; {
		case b.Problem != "" && must[r.Kind+r.Text]:
			t.Errorf("%s %q is refused: %s", r.Kind, r.Text, b.Problem)
		case b.Problem == "" && p != nil:
			t.Errorf("%s %q is read, and the program says: %s", r.Kind, r.Text, p)
		case b.Problem == "" && (b.Value == nil) == q.HasValue():
			t.Errorf("%s %q: one alone has a value", r.Kind, r.Text)
		case b.Problem == "" && b.Value != nil && !within(*b.Value, q.Value, 0):
			t.Errorf("%s %q: browser %v, program %v", r.Kind, r.Text, *b.Value, q.Value)
		case b.Problem == "" && len(b.Limits) == 2 && (q.Limits == nil || !within(b.Limits[0], q.Limits.Lower, 1e-3) || !within(b.Limits[1], q.Limits.Upper, 1e-3)):
			t.Errorf("%s %q: browser %v, program %v", r.Kind, r.Text, b.Limits, q.Limits)
		}
	}
}

// accidents are random strings of the pieces that quantities are made of.
func accidents(n int) []reading {
	random := rand.New(rand.NewSource(2))
	pieces := []string{"1", "0.5", "20", "85", "-", "−", "+", "±", ".", ",", "e", "e-3", "×10⁻³", "x", "10", "^", " ", "\u202f", "to ", " to ", "°C", "K", "ppm/K", "µΩ·cm", "Ω", "m", "mm", "in", "%", "/", "(k=2)", "(", ")", "*", "²", "<=", "at most ", "<script>", "NaN", "Infinity", "…"}
	kinds := []string{"temperature", "resistivity", "length", "ratio", "temperature coefficient", "voltage"}
	var list []reading
	for range n {
		var b strings.Builder
		for range 1 + random.Intn(5) {
			b.WriteString(pieces[random.Intn(len(pieces))])
		}
		list = append(list, reading{Kind: kinds[random.Intn(len(kinds))], Text: b.String()})
	}
	return list
}

func readInBrowser(t *testing.T, table []byte, list []reading) []reading {
	script, err := os.ReadFile(filepath.Join("..", "..", "themes", "quantity.js"))
	if err != nil {
		t.Fatal(err)
	}
	var got []reading
	ask := fmt.Sprintf(`(function () { var unitTable = %s; %s; return %s.map(function (r) {
		try { var q = quantity.read(r.Kind, r.Text); return { Value: q.value, Limits: (q.limits || []).map(function (x) { return isFinite(x) ? x : x > 0 ? 1e308 : -1e308; }) }; }
		catch (problem) { return { Problem: String(problem) }; }
	}); })()`, table, script, js(list))
	if err := chromedp.Run(chrome(t), chromedp.Navigate("about:blank"), chromedp.Evaluate(ask, &got)); err != nil {
		t.Fatal(err)
	}
	for i := range got { // JSON has no infinity: an open side is compared as open
		for k := range got[i].Limits {
			if got[i].Limits[k] >= 1e308 || got[i].Limits[k] <= -1e308 {
				got[i].Limits = nil
				break
			}
		}
	}
	return got
}
