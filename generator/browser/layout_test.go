package browser

import (
	"context"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"github.com/chromedp/cdproto/emulation"
	"github.com/chromedp/chromedp"
)

// TestNarrow: no page scrolls sideways at 320 and 390 px, nor at 1280 px with
// text twice as large; the interactive parts are in use then.
func TestNarrow(t *testing.T) {
	ctx := chrome(t)
	base := places(t)["file"]
	use := chromedp.Evaluate(`new Promise(function (done) { var f = document.getElementById("ask-at"); if (!f) return done(0); f.focus(); document.querySelectorAll("#ask details").forEach(d => { d.open = true; }); setTimeout(done, 150); })`, nil, awaiting)
	for _, page := range kinds(t) {
		for _, width := range []int64{320, 390} {
			var over []string
			if err := chromedp.Run(ctx, chromedp.EmulateViewport(width, 800), chromedp.Navigate(base+page), use, chromedp.Evaluate(sideways, &over)); err != nil {
				t.Fatalf("%s: %v", page, err)
			}
			if len(over) > 0 {
				t.Errorf("%s at %d px is wider than the window: %v", page, width, over)
			}
		}
		var over []string
		if err := chromedp.Run(ctx, chromedp.EmulateViewport(1280, 800), chromedp.Navigate(base+page), chromedp.Evaluate(`document.documentElement.style.fontSize = "200%"; 1`, nil), use, chromedp.Evaluate(sideways, &over)); err != nil {
			t.Fatal(err)
		}
		if len(over) > 0 {
			t.Errorf("%s with text twice as large is wider than the window: %v", page, over)
		}
	}
}

// sideways lists what makes a page wider than its window.
const sideways = `(function () {
	var w = document.documentElement.clientWidth;
	if (document.documentElement.scrollWidth <= w) return [];
	return Array.from(document.querySelectorAll("body *")).filter(e => e.getBoundingClientRect().right > w + 1 && !e.parentNode.closest(".scroll, pre, svg")).slice(0, 3).map(e => e.tagName + "." + e.className + "#" + e.id);
})()`

var loaded = regexp.MustCompile(`(?:href|src)="([^"]+\.(?:css|js|svg))"`)

// transfer is what a page and all that it names as style, script or mark weigh.
func transfer(t *testing.T, dir, page string) int {
	t.Helper()
	text, err := os.ReadFile(filepath.Join(dir, filepath.FromSlash(page)))
	if err != nil {
		t.Fatal(err)
	}
	sum := len(text)
	for _, m := range loaded.FindAllStringSubmatch(string(text), -1) {
		info, err := os.Stat(filepath.Join(dir, filepath.Dir(filepath.FromSlash(page)), filepath.FromSlash(m[1])))
		if err != nil {
			t.Fatal(err)
		}
		sum += int(info.Size())
	}
	return sum
}

// TestWeight: a material page stays under 60 KB in all; side by side under
// 150 KB and 1 KB a material and 160 B a segment.
func TestWeight(t *testing.T) {
	dir := published(t)
	found, _ := filepath.Glob(filepath.Join(dir, "material", "*.html"))
	heaviest, name := 0, ""
	for _, f := range found {
		if n := transfer(t, dir, "material/"+filepath.Base(f)); n > heaviest {
			heaviest, name = n, filepath.Base(f)
		}
	}
	t.Logf("the heaviest material page is %s, %d bytes", name, heaviest)
	if heaviest > 60*1024 {
		t.Errorf("%s weighs %d bytes", name, heaviest)
	}
	list, err := filepath.Glob(filepath.Join(dir, "data", "list.*.js"))
	if err != nil || len(list) != 1 {
		t.Fatalf("data of the list: %v %v", list, err)
	}
	text, err := os.ReadFile(list[0])
	if err != nil {
		t.Fatal(err)
	}
	materials, segments := strings.Count(string(text), `"fingerprint":`), strings.Count(string(text), "],[")+2*strings.Count(string(text), `"rho":[[`)
	weight, limit := transfer(t, dir, "side-by-side.html"), 150*1024+1024*materials+160*segments
	t.Logf("side by side is %d bytes of %d", weight, limit)
	if weight > limit {
		t.Errorf("side by side weighs %d bytes, more than %d", weight, limit)
	}
	if own := transfer(t, dir, "side-by-side.html") - len(text); own > 150*1024 {
		t.Errorf("side by side without its data weighs %d bytes", own)
	}
}

// TestWithoutScripts: with scripts off nothing interactive is shown, and each
// part says what it would do.
func TestWithoutScripts(t *testing.T) {
	ctx := chrome(t)
	base := places(t)["file"]
	off := chromedp.ActionFunc(func(ctx context.Context) error {
		return emulation.SetScriptExecutionDisabled(true).Do(ctx)
	})
	for page, want := range map[string]string{"side-by-side.html": "With scripts this page draws", "first-shunt.html": "With scripts this page tells", "material/cumn12ni.html": "With scripts this part tells", "materials.html": "Sorting and finding need scripts"} {
		var text string
		if err := chromedp.Run(ctx, off, chromedp.Navigate(base+page), chromedp.Text("body", &text)); err != nil {
			t.Fatal(err)
		}
		if !strings.Contains(text, want) {
			t.Errorf("%s without scripts does not say %q", page, want)
		}
		for _, hidden := range []string{"On the bench", "Check a delivery", "A current of", "Read in other units"} {
			if strings.Contains(text, hidden) {
				t.Errorf("%s without scripts shows %q", page, hidden)
			}
		}
	}
}
