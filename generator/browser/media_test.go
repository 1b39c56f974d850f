package browser

import (
	"context"

	"github.com/chromedp/cdproto/emulation"
	"github.com/chromedp/cdproto/runtime"
	"github.com/chromedp/chromedp"
)

func awaiting(p *runtime.EvaluateParams) *runtime.EvaluateParams { return p.WithAwaitPromise(true) }

// ready touches a field and waits until the scripts of its part are there.
func ready(id string) chromedp.Action {
	return chromedp.Evaluate(`new Promise(function (done) {
		var part = document.getElementById(`+js(id)+`).closest("[data-scripts]"), tries = 0;
		document.getElementById(`+js(id)+`).focus();
		(function look() { if (part.classList.contains("ready") || tries++ > 200) done(tries); else setTimeout(look, 10); })();
	})`, nil, awaiting)
}

func emulatePrint(ctx context.Context) error {
	return emulation.SetEmulatedMedia().WithMedia("print").Do(ctx)
}
