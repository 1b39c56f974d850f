package command

import (
	"bytes"
	"fmt"
	"os"
	"path/filepath"
	"testing"
	"time"
)

func BenchmarkZZ(b *testing.B) {
	dir := generated(b, 2000)
	for i := range 4 {
		start := time.Now()
		var out, errs bytes.Buffer
		if code := Run([]string{"publish", "--folder", dir, "--into", filepath.Join(dir, "public"), "--edition", fmt.Sprint("2026-0", i+1)}, &out, &errs); code != 0 {
			b.Fatal(errs.String())
		}
		info, _ := os.Stat(filepath.Join(dir, "materials", "editions", fmt.Sprint("2026-0", i+1)+".json"))
		fmt.Println(i+1, "editions:", time.Since(start), info.Size())
	}
	start := time.Now()
	var out, errs bytes.Buffer
	Run([]string{"publish", "--folder", dir, "--into", filepath.Join(dir, "public2")}, &out, &errs)
	fmt.Println("again from nothing:", time.Since(start))
}
