package browser

import (
	"encoding/json"
	"fmt"
	"math"
	"math/rand"
	"os"
	"path/filepath"
	"strconv"
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

// TestPrinterParity: the browser prints numbers as the program does, and
// knows the same wire gauges.
func TestPrinterParity(t *testing.T) {
	ctx := chrome(t)
	random := rand.New(rand.NewSource(3))
	type printed struct {
		X      float64
		Digits int
		Text   string
		Change string
	}
	var list, got []printed
	for range 3000 {
		x := (2*random.Float64() - 1) * math.Pow(10, float64(random.Intn(14)-7))
		if random.Intn(4) == 0 {
			x, _ = strconv.ParseFloat(strconv.FormatFloat(x, 'g', 3, 64), 64) // halves of the last place
		}
		list = append(list, printed{X: x, Digits: 1 + random.Intn(8)})
	}
	list = append(list, printed{X: 0, Digits: 3}, printed{X: 273.15, Digits: 4}, printed{X: 0.00999999, Digits: 2}, printed{X: 1e7, Digits: 3}, printed{X: 99.95e-6, Digits: 3})
	loadScript(t, ctx, "numbers")
	if err := chromedp.Run(ctx, chromedp.Evaluate(js(list)+`.map(function (p) { return { X: p.X, Text: numbers.significant(p.X, p.Digits), Change: numbers.change(p.X) }; })`, &got)); err != nil {
		t.Fatal(err)
	}
	for i, p := range list {
		if want := quantity.Number(p.X, p.Digits); got[i].Text != want {
			t.Errorf("%v with %d digits: browser %q, program %q", p.X, p.Digits, got[i].Text, want)
		}
		if want := quantity.ChangeText(p.X); got[i].Change != want && math.Abs(p.X) < 1e3 {
			t.Errorf("change %v: browser %q, program %q", p.X, got[i].Change, want)
		}
	}
	var gauges []float64
	table, err := quantity.Script()
	if err != nil {
		t.Fatal(err)
	}
	script, err := os.ReadFile(filepath.Join("..", "..", "themes", "quantity.js"))
	if err != nil {
		t.Fatal(err)
	}
	if err := chromedp.Run(ctx, chromedp.Evaluate(fmt.Sprintf(`(function () { var unitTable = %s; %s; return ["AWG 0000", "4/0 AWG", "AWG 000", "AWG 00", "AWG 0", "AWG 24", "24 AWG", "AWG 56", "AWG 57", "24"].map(quantity.gauge); })()`, table, script), &gauges)); err != nil {
		t.Fatal(err)
	}
	for i, n := range []int{-3, -3, -2, -1, 0, 24, 24, 56} {
		if !within(gauges[i], quantity.AWG(n), 0) {
			t.Errorf("AWG %d: browser %v, program %v", n, gauges[i], quantity.AWG(n))
		}
	}
	if gauges[8] != 0 || gauges[9] != 0 {
		t.Errorf("no gauges are read as %v", gauges[8:])
	}
}
