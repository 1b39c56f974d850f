package command

import (
	"context"
	"encoding/json"
	"fmt"
	"io"
	"net/http"
	"os"
	"path/filepath"
	"strings"
	"sync"
	"testing"
	"time"

	"ohmfolio/generator/follow"
)

// followed starts a live view of dir and ends it with the test.
func followed(t testing.TB, dir string) *follow.Server {
	t.Helper()
	f := &following{session: &session{out: io.Discard, err: io.Discard, folder: dir}, topics: allTopics()}
	v, err := follow.Start(follow.Options{Folder: dir, Build: f.build})
	if err != nil {
		t.Fatal(err)
	}
	ctx, stop := context.WithCancel(context.Background())
	ended := make(chan error, 1)
	go func() { ended <- v.Serve(ctx) }()
	t.Cleanup(func() {
		stop()
		select {
		case err := <-ended:
			if err != nil {
				t.Error("the view ended with", err)
			}
		case <-time.After(10 * time.Second):
			t.Error("the view does not end")
		}
	})
	return v
}

func fetched(t testing.TB, address string) (int, string) {
	t.Helper()
	r, err := http.Get(address)
	if err != nil {
		t.Fatal(err)
	}
	defer r.Body.Close()
	text, _ := io.ReadAll(r.Body)
	return r.StatusCode, string(text)
}

// until asks again and again, 20 s at most.
func until(t testing.TB, what string, ok func() bool) time.Duration {
	t.Helper()
	start := time.Now()
	for !ok() {
		if time.Since(start) > 20*time.Second {
			t.Fatalf("%s: not within 20 s", what)
		}
		time.Sleep(2 * time.Millisecond)
	}
	return time.Since(start)
}

func save(t testing.TB, file, text string) {
	t.Helper()
	if err := os.WriteFile(file, []byte(text), 0o644); err != nil {
		t.Fatal(err)
	}
}

// TestFollowShowsEdits: a saved edit, a broken record, a mended one, an editor
// that writes by rename, a renamed record, a deleted folder made again, a new
// report; published pages carry no trace.
func TestFollowShowsEdits(t *testing.T) {
	dir := yard(t)
	v := followed(t, dir)
	file := filepath.Join(dir, "materials", "copper.yaml")
	page := func(path string) string { _, text := fetched(t, v.Address()+path); return text }
	shows := func(path, what string) func() bool {
		return func() bool { return strings.Contains(page(path), what) }
	}
	first := page("material/copper.html")
	if !strings.Contains(first, "/.follow/follow.js") || !strings.Contains(first, "connect-src 'self'") {
		t.Fatalf("the page does not follow:\n%.600s", first)
	}
	save(t, file, strings.Replace(copper, "name: Copper", "name: Copper of today", 1))
	until(t, "an edit", shows("material/copper.html", "Copper of today"))

	save(t, file, strings.Replace(copper, "resistivity", "resistvity", 1))
	until(t, "a broken record is told", func() bool { return strings.Contains(page(".follow/news?has=0"), "did you mean resistivity?") })
	if !strings.Contains(page("material/copper.html"), "Copper of today") {
		t.Error("the page of a broken record is gone")
	}
	save(t, file+".new", strings.Replace(copper, "name: Copper", "name: Copper by rename", 1))
	os.Rename(file+".new", file)
	until(t, "an editor that renames", shows("material/copper.html", "Copper by rename"))

	os.Rename(file, filepath.Join(dir, "materials", "copper-2.yaml"))
	until(t, "a renamed record", func() bool {
		code, text := fetched(t, v.Address()+"material/copper-2.html")
		return code == 200 && strings.Contains(text, "Copper by rename")
	})
	os.Rename(filepath.Join(dir, "materials"), filepath.Join(dir, "away"))
	until(t, "a deleted folder is told", func() bool { return strings.Contains(page(".follow/news?has=0"), "no folder materials") })
	os.Rename(filepath.Join(dir, "away"), filepath.Join(dir, "materials"))
	until(t, "the folder is back", func() bool { return !strings.Contains(page(".follow/news?has=0"), "no folder materials") })
	save(t, filepath.Join(dir, "materials", "copper-2.yaml"), strings.Replace(copper, "name: Copper", "name: Copper once more", 1))
	until(t, "an edit after that", shows("material/copper-2.html", "Copper once more"))

	os.MkdirAll(filepath.Join(dir, "content", "reports"), 0o755)
	save(t, filepath.Join(dir, "content", "reports", "new.md"), "# A new report\n\nWords.\n")
	until(t, "a new report in a new folder", shows("report/new.html", "A new report"))

	if code, _, errs := run("publish", "--folder", dir); code != 0 {
		t.Fatal(errs)
	}
	for name, text := range snapshot(t, filepath.Join(dir, "public")) {
		if strings.Contains(text, ".follow") || strings.Contains(text, "connect-src") {
			t.Errorf("%s carries a trace of the live view", name)
		}
	}
}

// TestFollowIsForThisMachine: another Host, another method, and paths that
// climb are refused; two views find two ports.
func TestFollowIsForThisMachine(t *testing.T) {
	dir := yard(t)
	save(t, filepath.Join(dir, "secret.txt"), "secret")
	v, other := followed(t, dir), followed(t, dir)
	if v.Address() == other.Address() {
		t.Errorf("both at %s", v.Address())
	}
	for _, host := range []string{"evil.example", "127.0.0.1", "127.0.0.1:1", "localhost.evil.example:6411", "[::1]:6411", ""} {
		r, _ := http.NewRequest("GET", v.Address(), nil)
		r.Host = host
		if host == "" {
			r.Host = "."
		}
		a, err := http.DefaultClient.Do(r)
		if err != nil {
			t.Fatal(err)
		}
		a.Body.Close()
		if a.StatusCode != http.StatusForbidden && a.StatusCode != http.StatusBadRequest {
			t.Errorf("Host %q: %s", host, a.Status)
		}
	}
	for _, path := range []string{"../secret.txt", "%2e%2e/secret.txt", "..%2fsecret.txt", "material/../../secret.txt", "/etc/passwd", "materials/copper.yaml", ".follow/../secret.txt", "..\\secret.txt", "\x00"} {
		r, err := http.NewRequest("GET", v.Address(), nil)
		if err != nil {
			t.Fatal(err)
		}
		r.URL.Opaque = strings.TrimSuffix(v.Address(), "/") + "/" + strings.ReplaceAll(strings.ReplaceAll(path, "\x00", "%00"), "\\", "%5c")
		a, err := http.DefaultClient.Do(r)
		if err != nil {
			continue // refused before it was answered
		}
		text, _ := io.ReadAll(a.Body)
		a.Body.Close()
		if a.StatusCode == 200 || strings.Contains(string(text), "secret") && !strings.Contains(string(text), "no such page") {
			t.Errorf("%q: %s %.80q", path, a.Status, text)
		}
	}
	if a, err := http.Post(v.Address(), "text/plain", strings.NewReader("x")); err != nil || a.StatusCode != http.StatusMethodNotAllowed {
		t.Errorf("a POST: %v %v", a, err)
	}
}

// TestAThousandSaves: one after another while readers read; the last one is
// what is shown, and nothing is left running.
func TestAThousandSaves(t *testing.T) {
	dir := yard(t)
	v := followed(t, dir)
	file := filepath.Join(dir, "materials", "copper.yaml")
	done := make(chan struct{})
	var readers sync.WaitGroup
	for range 3 {
		readers.Go(func() {
			for {
				select {
				case <-done:
					return
				default:
					if code, text := fetched(t, v.Address()+"material/tungsten.html"); code != 200 || !strings.Contains(text, "Tungsten") {
						t.Errorf("a reader got %d", code)
						return
					}
				}
			}
		})
	}
	for i := range 1000 {
		text := strings.Replace(copper, "name: Copper", fmt.Sprintf("name: Copper %d", i), 1)
		if i%7 == 3 {
			text = "name: [broken\n"
		}
		save(t, file, text)
	}
	save(t, file, strings.Replace(copper, "name: Copper", "name: The last copper", 1))
	until(t, "the last of a thousand saves", func() bool {
		_, text := fetched(t, v.Address()+"material/copper.html")
		return strings.Contains(text, "The last copper")
	})
	close(done)
	readers.Wait()
}

// TestNewsWait: news come when there are some, with findings as JSON.
func TestNewsWait(t *testing.T) {
	dir := yard(t)
	v := followed(t, dir)
	_, text := fetched(t, v.Address()+".follow/news?has=0")
	var news struct {
		Version  int
		Findings []follow.Finding
	}
	if err := json.Unmarshal([]byte(text), &news); err != nil || news.Version == 0 {
		t.Fatal(text, err)
	}
	until(t, "a quiet state", func() bool { // the first judgement may still come
		_, text := fetched(t, v.Address()+".follow/news?has=0")
		json.Unmarshal([]byte(text), &news)
		return len(news.Findings) > 0
	})
	got := make(chan string, 1)
	go func() {
		_, text := fetched(t, v.Address()+fmt.Sprintf(".follow/news?has=%d", news.Version))
		got <- text
	}()
	select {
	case text := <-got:
		t.Errorf("news without any: %s", text)
	case <-time.After(80 * time.Millisecond):
	}
	save(t, filepath.Join(dir, "materials", "copper.yaml"), copper+"notes: seen\n")
	select {
	case <-got:
	case <-time.After(5 * time.Second):
		t.Error("no news after a save")
	}
}

// BenchmarkFollowOneEdit is the time from a save to the new page, at as many
// records as FOLLOW says (1,000 when it says nothing).
func BenchmarkFollowOneEdit(b *testing.B) {
	n := 1000
	fmt.Sscan(os.Getenv("FOLLOW"), &n)
	dir := generated(b, n)
	v := followed(b, dir)
	files, _ := filepath.Glob(filepath.Join(dir, "materials", "*.yaml"))
	file := files[len(files)/2]
	id := strings.TrimSuffix(filepath.Base(file), ".yaml")
	text, err := os.ReadFile(file)
	if err != nil {
		b.Fatal(err)
	}
	i := 0
	for b.Loop() {
		i++
		b.StopTimer()
		time.Sleep(400 * time.Millisecond) // until the edit before was judged: people do not save in one breath
		b.StartTimer()
		mark := fmt.Sprintf("edit %d of it", i)
		save(b, file, string(text)+"notes: "+mark+"\n")
		until(b, "the edit", func() bool {
			_, page := fetched(b, v.Address()+"material/"+id+".html")
			return strings.Contains(page, mark)
		})
	}
}
