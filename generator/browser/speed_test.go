package browser

import (
	"bytes"
	"context"
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/chromedp/cdproto/emulation"
	"github.com/chromedp/chromedp"

	"ohmfolio/generator/command"
)

// multiplied copies the demo with every material many times over.
func multiplied(t *testing.T, times int) string {
	t.Helper()
	from, to := "../..", t.TempDir()
	if err := os.CopyFS(filepath.Join(to, "content"), os.DirFS(filepath.Join(from, "content"))); err != nil {
		t.Fatal(err)
	}
	if err := os.CopyFS(filepath.Join(to, "materials"), os.DirFS(filepath.Join(from, "materials"))); err != nil {
		t.Fatal(err)
	}
	records, _ := filepath.Glob(filepath.Join(to, "materials", "*.yaml"))
	for _, r := range records {
		stem := strings.TrimSuffix(filepath.Base(r), ".yaml")
		if stem == "sources" {
			continue
		}
		text, err := os.ReadFile(r)
		if err != nil {
			t.Fatal(err)
		}
		for i := range times {
			kept := []string{}
			for _, line := range strings.Split(string(text), "\n") {
				if !strings.HasPrefix(line, "formerly:") {
					kept = append(kept, line)
				}
			}
			if err := os.WriteFile(filepath.Join(to, "materials", fmt.Sprintf("%s-%d.yaml", stem, i)), []byte(strings.Join(kept, "\n")), 0o600); err != nil {
				t.Fatal(err)
			}
		}
	}
	return to
}

const timeKeystroke = `new Promise(function (done) {
	var f = document.getElementById("keep-less"), all = [], n = 0;
	(function next() {
		var t = performance.now();
		f.value = (n % 2 ? "0.3" : "0.35") + " %";
		f.dispatchEvent(new Event("input", { bubbles: true }));
		requestAnimationFrame(function () { setTimeout(function () { // after the frame that answers
			all.push(performance.now() - t);
			if (++n < 15) next(); else done(all.sort(function (a, b) { return a - b; })[7]);
		}, 0); });
	})();
})`

const timeCrosshair = `(function () {
	var svg = document.getElementById("drawing"), box = svg.getBoundingClientRect(), all = [];
	for (var i = 0; i < 60; i++) {
		var t = performance.now();
		svg.dispatchEvent(new PointerEvent("pointermove", { clientX: box.left + box.width * (0.1 + i / 100), clientY: box.top + 20 }));
		document.body.offsetHeight;
		all.push(performance.now() - t);
	}
	return all.sort(function (a, b) { return a - b; })[30];
})()`

// TestThousand: with a thousand materials and a processor slowed four times,
// side by side is usable within a second, a keystroke answers within 50 ms
// and the crosshair moves within 8 ms (medians).
func TestThousand(t *testing.T) {
	if testing.Short() {
		t.Skip("publishes a thousand materials")
	}
	ctx := chrome(t)
	dir := filepath.Join(t.TempDir(), "site")
	var out, errs bytes.Buffer
	if code := command.Run([]string{"publish", "--folder", multiplied(t, 23), "--into", dir}, &out, &errs); code == 2 {
		t.Fatal(errs.String())
	}
	var usable, key, cross float64
	var materials int
	slow := chromedp.ActionFunc(func(ctx context.Context) error { return emulation.SetCPUThrottlingRate(4).Do(ctx) })
	if err := chromedp.Run(ctx, slow, chromedp.Navigate("file://"+filepath.ToSlash(dir)+"/side-by-side.html"),
		chromedp.Evaluate(`performance.getEntriesByType("navigation")[0].domContentLoadedEventEnd`, &usable), chromedp.Evaluate(`listed.length`, &materials),
		settle(), chromedp.Evaluate(timeKeystroke, &key, awaiting), chromedp.Evaluate(timeCrosshair, &cross)); err != nil {
		t.Fatal(err)
	}
	t.Logf("%d materials: usable after %.0f ms, a keystroke %.1f ms, the crosshair %.2f ms", materials, usable, key, cross)
	if materials < 1000 {
		t.Errorf("only %d materials", materials)
	}
	// A machine that does other work at the same time is slower than what is
	// promised; three times as long is a fault of ours.
	if usable > 3000 || key > 150 || cross > 24 {
		t.Errorf("usable after %.0f ms, keystroke %.1f ms, crosshair %.2f ms", usable, key, cross)
	}
}
