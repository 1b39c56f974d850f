package browser

import (
	"regexp"
	"strconv"
	"strings"
	"testing"

	"github.com/chromedp/chromedp"
	"github.com/chromedp/chromedp/kb"
)

// TestPublishedValues types twelve published questions into the real pages and
// reads the published answers. Sources: IEC 60028:1925 (ρ, α and mass of
// annealed copper; 100 %IACS = 58 MS/m), IEC 60751:2022 table 1 (Pt100),
// NIST SP 811 B.8 (circular mil, foot and inch), ASTM B258 (AWG 24 is
// 0.511 mm), the record's own source for CuMn12Ni (β = −0.28 ppm/K²).
func TestPublishedValues(t *testing.T) {
	ctx := chrome(t)
	base := places(t)["file"]
	for _, c := range []struct {
		page   string
		fields [][2]string
		want   string
	}{
		{"copper-annealed", [][2]string{{"ask-at", "20 °C"}}, "1.7241\u202fµΩ·cm"},
		{"copper-annealed", [][2]string{{"ask-at", "68 °F"}}, "58.001\u202fMS/m"},                                      // 1/1.7241, rounded in the record
		{"copper-annealed", [][2]string{{"ask-at", "20 °C"}, {"ask-unit", "Ω·cmil/ft"}}, "10.371"},                     // wire tables of the trade
		{"copper-annealed", [][2]string{{"ask-at", "75 °C"}, {"ask-from", "20 °C"}}, "1.216"},                          // 1 + 0.00393·55 = 1.21615
		{"copper-annealed", [][2]string{{"ask-at", "0 °C"}, {"ask-from", "20 °C"}}, "0.9214"},                          // 1 − 0.00393·20
		{"platinum-thermometer", [][2]string{{"body-r", "100 Ω"}, {"body-t", "0 °C"}, {"ask-at", "100 °C"}}, "138.51"}, // IEC 60751: 138.51
		{"platinum-thermometer", [][2]string{{"body-r", "100 Ω"}, {"body-t", "0 °C"}, {"ask-at", "-100 °C"}}, "60.26"}, // 60.26
		{"platinum-thermometer", [][2]string{{"body-r", "100 Ω"}, {"body-t", "0 °C"}, {"ask-at", "850 °C"}}, "390.48"}, // 390.48
		{"platinum-thermometer", [][2]string{{"body-r", "100 Ω"}, {"body-t", "0 °C"}, {"body-reads", "138.5055 Ω"}}, "100\u202f°C"},
		{"cumn12ni", [][2]string{{"ask-at", "100 °C"}, {"ask-from", "25 °C"}}, "−1575\u202fppm"},                                // −0.28·75²
		{"cumn12ni", [][2]string{{"ask-at", "61 °C"}, {"ask-unit", "Ω·cmil/ft"}}, "265\u202fΩ·cmil/ft"},                         // 44 µΩ·cm · 6.0153
		{"copper-annealed", [][2]string{{"piece-size", "AWG 24"}, {"piece-length", "1000 ft"}, {"piece-at", "20 °C"}}, "25.67"}, // ohm per 1000 ft, copper wire tables, NBS Handbook 100
	} {
		var said string
		steps := chromedp.Tasks{chromedp.Navigate(base + "material/" + c.page + ".html"), ready("ask-at"), chromedp.Evaluate(`document.querySelectorAll("#ask details").forEach(d => { d.open = true; }); 1`, nil)}
		for _, f := range c.fields {
			steps = append(steps, typed(f[0], f[1]))
		}
		if err := chromedp.Run(ctx, append(steps, chromedp.Evaluate(`document.getElementById("ask").innerText`, &said))); err != nil {
			t.Fatalf("%s: %v", c.page, err)
		}
		if !says(said, c.want) {
			t.Errorf("%s, %v: %q is missing in %q", c.page, c.fields, c.want, said)
		}
	}
}

var anyNumber = regexp.MustCompile(`\d+\.\d+`)

// says tells whether a text has the published value, or a number that rounds
// to it at its last place.
func says(text, want string) bool {
	if strings.Contains(text, want) {
		return true
	}
	_, places, ok := strings.Cut(want, ".")
	for _, s := range anyNumber.FindAllString(text, -1) {
		x, err := strconv.ParseFloat(s, 64)
		if ok && err == nil && strconv.FormatFloat(x, 'f', len(places), 64) == want {
			return true
		}
	}
	return false
}

// TestRefusal: outside the valid range there is a plain sentence and no value.
func TestRefusal(t *testing.T) {
	ctx := chrome(t)
	var said string
	if err := chromedp.Run(ctx, chromedp.Navigate(places(t)["file"]+"material/cumn12ni.html"), ready("ask-at"), typed("ask-at", "200 °C"), chromedp.Evaluate(`document.getElementById("ask-value").innerText`, &said)); err != nil {
		t.Fatal(err)
	}
	if !strings.Contains(said, "200\u202f°C lies outside the valid range 12\u202f°C to 100\u202f°C; no value is given there") || strings.Contains(said, "Resistivity at") {
		t.Errorf("200 °C gives %q", said)
	}
}

// TestDelivery holds a reading against limits of an order. Corrected by hand:
// 1.800 µΩ·cm at 25 °C are 1.800/(1 + 0.00393·5) = 1.7653 at 20 °C.
func TestDelivery(t *testing.T) {
	ctx := chrome(t)
	var plain, narrowed string
	if err := chromedp.Run(ctx, chromedp.Navigate(places(t)["file"]+"material/copper-annealed.html"), ready("ask-at"), chromedp.Evaluate(`document.querySelectorAll("#ask details").forEach(d => { d.open = true; }); 1`, nil),
		typed("lot-reads", "1.800 µΩ·cm"), typed("lot-at", "25 °C"), typed("lot-u", "0.5 %"), typed("lot-limits", "1.72 to 1.77 µΩ·cm"), typed("lot-told-at", "20 °C"),
		chromedp.Evaluate(`document.getElementById("delivery").innerText`, &plain),
		typed("lot-rule", "inside"), chromedp.Evaluate(`document.getElementById("delivery").innerText`, &narrowed)); err != nil {
		t.Fatal(err)
	}
	if !strings.Contains(plain, "1.76531") || !strings.Contains(plain, "accept") || !strings.Contains(plain, "within U of a limit") {
		t.Errorf("the lot gives %q", plain)
	}
	if !strings.Contains(narrowed, "reject inside, but within U of a limit") {
		t.Errorf("with the narrowed rule it gives %q", narrowed)
	}
}

// TestFirstShunt: 200 A and 50 mV in strip of 1 mm over 20 mm: 250 µΩ, 10 W,
// 35.2 mm of an alloy of 44.0 µΩ·cm (ρL/Rt). U²/8kρ above the ends is the
// theorem of Kohlrausch with k·ρ taken as constant.
func TestFirstShunt(t *testing.T) {
	ctx := chrome(t)
	var facts, table, block string
	if err := chromedp.Run(ctx, chromedp.Navigate(places(t)["file"]+"first-shunt.html"), typed("shunt-copper", "1 %"), settle(),
		chromedp.Evaluate(`document.getElementById("shunt-facts").innerText`, &facts), chromedp.Evaluate(`document.querySelector("#shunt-answer tbody").innerText`, &table), textOf("shunt-block", &block)); err != nil {
		t.Fatal(err)
	}
	if !strings.Contains(facts, "250.0\u202fµΩ") || !strings.Contains(facts, "10.0\u202fW") {
		t.Errorf("facts: %q", facts)
	}
	if !strings.Contains(table, "35.2") || !strings.Contains(table, "0.568") {
		t.Errorf("table: %q", table)
	}
	for _, want := range []string{"study: shunt", "current: 200 A", "copper_share: 1 %", "cumn12ni"} {
		if !strings.Contains(block, want) {
			t.Errorf("%q is missing in the study %q", want, block)
		}
	}
}

// TestFind finds by designation, former ID, element and a slip of the finger.
func TestFind(t *testing.T) {
	ctx := chrome(t)
	base := places(t)["file"]
	for text, want := range map[string]string{"2.1362": "CuMn12Ni", "manganese-copper-strip": "CuMn12Ni", "platinm": "Platinum", "fingerprint": "fingerprint", "iec 60751": "60751", "shunt alloys": "Low-TCR"} {
		var found string
		if err := chromedp.Run(ctx, chromedp.Navigate(base+"material/zinc.html"), ready("find-text"), typed("find-text", text), textOf("find-results", &found)); err != nil {
			t.Fatal(err)
		}
		if !strings.Contains(found, want) {
			t.Errorf("%q finds %q", text, found)
		}
	}
	var at string
	if err := chromedp.Run(ctx, chromedp.Navigate(base+"guide/how-to-read-a-sheet.html"), ready("find-text"), chromedp.SendKeys("#find-text", "cumn12ni"), chromedp.KeyEvent(kb.ArrowDown), chromedp.Evaluate(`document.activeElement.href`, &at)); err != nil {
		t.Fatal(err)
	}
	if !strings.HasPrefix(at, base+"material/") {
		t.Errorf("the arrow key leads to %q", at)
	}
}

// TestReadIn: a reader's units apply to tables and facts, and never to the
// controlled sheet.
func TestReadIn(t *testing.T) {
	ctx := chrome(t)
	base := places(t)["file"]
	keep := chromedp.Evaluate(`localStorage.setItem("read-in", JSON.stringify({temperature: "°F", resistivity: "Ω·cmil/ft", mark: ","})); 1`, nil)
	var page, sheet string
	if err := chromedp.Run(ctx, chromedp.Navigate(base+"material/cumn12ni.html"), keep, chromedp.Reload(), settle(), chromedp.Evaluate(`document.getElementById("content").innerText`, &page),
		chromedp.Navigate(base+"sheet/cumn12ni.html"), settle(), chromedp.Evaluate(`document.getElementById("content").innerText`, &sheet), chromedp.Evaluate(`localStorage.clear(); 1`, nil)); err != nil {
		t.Fatal(err)
	}
	// 12 °C to 100 °C are 53.6 °F to 212 °F; 44.0 µΩ·cm are 265 Ω·cmil/ft.
	for _, want := range []string{"Shown in your units", "53.6\u202f°F to 212\u202f°F", "265\u202fΩ·cmil/ft", "T in °F", "ρ in Ω·cmil/ft"} {
		if !strings.Contains(page, want) {
			t.Errorf("%q is missing on the page: %.600q", want, page)
		}
	}
	if strings.Contains(sheet, "°F") || !strings.Contains(sheet, "µΩ·cm") {
		t.Errorf("the sheet has changed its units")
	}
}

// TestReadInEverywhere: with the reader's units the interactive pages work,
// and tell the same numbers in them.
func TestReadInEverywhere(t *testing.T) {
	ctx := chrome(t)
	base := places(t)["file"]
	keep := chromedp.Evaluate(`localStorage.setItem("read-in", JSON.stringify({temperature: "°F", resistivity: "Ω·cmil/ft"})); 1`, nil)
	var bench, ask, shunt string
	if err := chromedp.Run(ctx, chromedp.Navigate(base+"side-by-side.html"), keep, chromedp.Reload(), settle(), chromedp.Evaluate(`document.getElementById("content").innerText`, &bench),
		chromedp.Navigate(base+"material/copper-annealed.html"), ready("ask-at"), typed("ask-at", "68"), chromedp.Evaluate(`document.getElementById("ask").innerText`, &ask),
		chromedp.Navigate(base+"first-shunt.html"), settle(), chromedp.Evaluate(`document.getElementById("content").innerText`, &shunt), chromedp.Evaluate(`localStorage.clear(); 1`, nil)); err != nil {
		t.Fatal(err)
	}
	// −40 °C to 85 °C are −40 °F to 185 °F; 68 °F are 20 °C, where annealed
	// copper has 10.371 Ω·cmil/ft; 23 °C are 73.4 °F.
	for name, c := range map[string][2]string{"bench": {bench, "from −40\u202f°F to 185\u202f°F"}, "ask": {ask, "10.371\u202fΩ·cmil/ft"}, "shunt": {shunt, "73.4\u202f°F"}} {
		if !strings.Contains(c[0], c[1]) || nonsense(c[0]) {
			t.Errorf("%s does not say %q: %.900q", name, c[1], c[0])
		}
	}
}
