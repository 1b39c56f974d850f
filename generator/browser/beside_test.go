package browser

import (
	"regexp"
	"strings"
	"testing"

	"github.com/chromedp/chromedp"
)

// typed sets a field as a reader would and lets the page answer.
func typed(id, value string) chromedp.Action {
	return chromedp.Evaluate(`(function () { var f = document.getElementById(`+js(id)+`); f.focus(); f.value = `+js(value)+`; f.dispatchEvent(new Event("input", { bubbles: true })); f.dispatchEvent(new Event("change", { bubbles: true })); })()`, nil)
}

func textOf(id string, into *string) chromedp.Action {
	return chromedp.Evaluate(`document.getElementById(`+js(id)+`).textContent`, into)
}

// settle waits for two frames, in which the page draws what was typed.
func settle() chromedp.Action {
	return chromedp.Evaluate(`new Promise(r => requestAnimationFrame(() => requestAnimationFrame(() => setTimeout(r, 200))))`, nil, awaiting)
}

// TestSideBySide does what a designer does with a copied folder: asks for the
// alloys within ±0.15 % from −40 to 85 °C, is told that none covers the window
// and which does over a part of it, sees why the others fail, and sends a link
// that shows the same.
func TestSideBySide(t *testing.T) {
	ctx := chrome(t)
	base := places(t)["file"]
	var kept, partly, dropped, readings, link, supplier, heads, again, told string
	var curves int
	err := chromedp.Run(ctx, chromedp.Navigate(base+"side-by-side.html"),
		typed("window-ref", "20 °C"), typed("keep-less", "0.15 %"), settle(),
		chromedp.Evaluate(`document.getElementById("dropped").open = true; 1`, nil), settle(),
		textOf("kept", &kept), textOf("partly", &partly), textOf("dropped-list", &dropped),
		chromedp.Click("#clear"), typed("add", "copper-annealed"), typed("add", "CuMn12Ni lot 0417, cumn12ni-strip-lot"), settle(),
		typed("supplier", "±20 ppm/K, box, 20 to 60 °C"), typed("read-at-text", "61 °C"), settle(),
		textOf("readings", &readings), textOf("measures", &heads), textOf("supplier-answer", &supplier),
		chromedp.Evaluate(`document.querySelectorAll("#drawing .curve").length`, &curves),
		chromedp.Value("#link", &link))
	if err != nil {
		t.Fatal(err)
	}
	if !strings.Contains(kept, "None of") || !strings.Contains(partly, "CuMn12Ni") || !strings.Contains(dropped, "changes by −2123\u202fppm at −40") || !strings.Contains(dropped, "no coefficient") {
		t.Errorf("kept %q, partly %q, dropped %q", kept, partly, dropped)
	}
	// Annealed copper at 61 °C from 20 °C: 3.93e-3 × 41 = 16.11 % (IEC 60028).
	if curves != 2 || !strings.Contains(readings, "16.11\u202f%") || !strings.Contains(readings, "CuMn12Ni") {
		t.Errorf("%d curves, readings %q", curves, readings)
	}
	if !strings.Contains(heads, "chord, cold") || !strings.Contains(supplier, "within the figure") || !strings.Contains(supplier, "outside the figure") {
		t.Errorf("measures %q, supplier %q", heads, supplier)
	}
	old := strings.Replace(link, "copper-annealed~", "copper-annealed~9", 1)
	i := strings.Index(old, "copper-annealed~9")
	fields := strings.SplitN(old[i:], "~", 4) // id, revision, fingerprint, rest
	old = strings.Replace(old, fields[2], "0000-0000-0000", 1)
	err = chromedp.Run(ctx, chromedp.Navigate("about:blank"), chromedp.Navigate(link), settle(), textOf("readings", &again), textOf("link-told", &told))
	if err != nil || again != readings || told != "" {
		t.Errorf("the link shows %q and tells %q (%v)", again, told, err)
	}
	if err = chromedp.Run(ctx, chromedp.Navigate("about:blank"), chromedp.Navigate(old), settle(), textOf("link-told", &told)); err != nil || !strings.Contains(told, "has changed since this link was made") {
		t.Errorf("an old link tells %q (%v)", told, err)
	}
}

var quoted = regexp.MustCompile("“[^”]*”")

// nonsense tells whether a page says what no reader should see, beside what
// the reader's own words are quoted as.
func nonsense(text string) bool {
	text = quoted.ReplaceAllString(text, "")
	for _, s := range []string{"NaN", "undefined", "not a number", "Infinity", "[object"} {
		if strings.Contains(text, s) {
			return true
		}
	}
	return false
}

// TestHostileAddress: nothing that stands in an address runs, hangs the page
// or shows as markup, and a former name explains itself.
func TestHostileAddress(t *testing.T) {
	ctx := chrome(t)
	base := places(t)["file"]
	for _, hash := range []string{
		`#materials=<img src=x onerror=window.hurt=1>`, `#from=<script>window.hurt=1</script>&to=85 °C`, `#show=javascript:window.hurt=1`,
		`#materials=__proto__,constructor,toString`, `#family=__proto__&show=__proto__`, `#%E0%A4%A`, `#from=1e999 °C&to=NaN&ref=Infinity`, `#` + strings.Repeat("materials=a&", 4000),
		`#supplier=` + strings.Repeat("±20 ppm/K,", 200), `#at=%22onfocus%3Dwindow.hurt%3D1`,
	} {
		var hurt, alive bool
		var text string
		if err := chromedp.Run(ctx, chromedp.Navigate("about:blank"), chromedp.Navigate(base+"side-by-side.html"+hash), settle(),
			chromedp.Evaluate(`window.hurt === 1 || document.querySelector("main img, main script:not([src])") !== null`, &hurt),
			chromedp.Evaluate(`document.getElementById("question").offsetHeight > 0`, &alive), chromedp.Evaluate(`document.querySelector("main").innerText`, &text)); err != nil {
			t.Fatalf("%s: %v", hash[:min(60, len(hash))], err)
		}
		if hurt || !alive || nonsense(text) {
			t.Errorf("%s: hurt %v, alive %v", hash[:min(60, len(hash))], hurt, alive)
		}
	}
	var told string
	if err := chromedp.Run(ctx, chromedp.Navigate("about:blank"), chromedp.Navigate(base+"side-by-side.html#materials=manganese-copper-strip,no-such"), settle(), textOf("link-told", &told)); err != nil {
		t.Fatal(err)
	}
	if !strings.Contains(told, "is now called cumn12ni") || !strings.Contains(told, "no material of this reference") {
		t.Errorf("a former and an unknown name: %q", told)
	}
}

// TestNonsense: any text in any field of side by side and of a material page
// gives a plain sentence, never NaN and never a failing script.
func TestNonsense(t *testing.T) {
	ctx := chrome(t)
	base := places(t)["file"]
	texts := []string{"", "x", "1,5 %", "12 parsecs", "-500 °C", "1e999", "±", "<b>", "20 to", "°C", "0", "-1 Ω", "NaN", "\u0000", strings.Repeat("9", 400), "0 Ω", "0 mm", "20 °C to 60 °C"}
	for page, begin := range map[string]chromedp.Action{"side-by-side.html": settle(), "material/cumn12ni.html": ready("ask-at"), "material/zinc.html": ready("ask-at"), "material/copper-pure.html": ready("ask-at")} {
		var ids []string
		if err := chromedp.Run(ctx, chromedp.Navigate(base+page), begin, chromedp.Evaluate(`Array.from(document.querySelectorAll("main input[id]:not([type=checkbox]):not([type=range]):not([readonly])")).map(f => f.id)`, &ids)); err != nil {
			t.Fatal(err)
		}
		if len(ids) < 1 {
			t.Errorf("%s has no fields", page)
		}
		for _, id := range ids {
			for _, text := range texts {
				var said string
				if err := chromedp.Run(ctx, typed(id, text), chromedp.Evaluate(`document.querySelector("main").innerText`, &said)); err != nil {
					t.Fatal(err)
				}
				if nonsense(said) {
					t.Errorf("%s, field %s: %q gives NaN or worse", page, id, text)
				}
			}
			if err := chromedp.Run(ctx, chromedp.Evaluate(`(function () { var f = document.getElementById(`+js(id)+`); f.value = f.defaultValue; f.dispatchEvent(new Event("input", { bubbles: true })); })()`, nil)); err != nil {
				t.Fatal(err)
			}
		}
	}
}

// TestCopies: what leaves side by side has the reader's decimal mark, plain
// minus signs and what it rests on, and the figure is well-formed SVG.
func TestCopies(t *testing.T) {
	ctx := chrome(t)
	base := places(t)["file"]
	var csv, copied, svg string
	var good bool
	if err := chromedp.Run(ctx, chromedp.Navigate(base+"side-by-side.html"), chromedp.Evaluate(`localStorage.setItem("read-in", JSON.stringify({mark: ","})); 1`, nil), chromedp.Reload(), settle(),
		chromedp.Evaluate(`copies.csv(document.querySelector("#measures table"), ["rests on this"])`, &csv), chromedp.Evaluate(`tables.asText(document.querySelector("#measures table"))`, &copied),
		chromedp.Evaluate(`copies.picture(document.getElementById("drawing"), ["rests on this"])`, &svg),
		chromedp.Evaluate(`new DOMParser().parseFromString(copies.picture(document.getElementById("drawing"), ["a & b"]), "image/svg+xml").querySelector("parsererror") === null`, &good),
		chromedp.Evaluate(`localStorage.clear(); 1`, nil)); err != nil {
		t.Fatal(err)
	}
	for what, text := range map[string]string{"CSV": csv, "copy": copied} {
		if !strings.Contains(text, "43,62") || strings.Contains(text, "43.62") || strings.Contains(text, "\u2212") {
			t.Errorf("%s: %q", what, text)
		}
	}
	if !strings.Contains(csv, "rests on this") || !strings.Contains(csv, ";") {
		t.Errorf("CSV: %q", csv)
	}
	if !good || !strings.Contains(svg, "rests on this") || strings.Contains(svg, "crosshair") || !strings.Contains(svg, "stroke-dasharray") {
		t.Errorf("SVG: good %v, %.300q", good, svg)
	}
}
