package browser

import (
	"context"

	"github.com/chromedp/cdproto/emulation"
)

func emulatePrint(ctx context.Context) error {
	return emulation.SetEmulatedMedia().WithMedia("print").Do(ctx)
}
