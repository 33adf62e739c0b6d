package viz

import (
	"context"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"sync"
	"testing"
	"time"

	"github.com/chromedp/cdproto/cdp"
	"github.com/chromedp/cdproto/emulation"
	"github.com/chromedp/cdproto/log"
	"github.com/chromedp/cdproto/network"
	"github.com/chromedp/cdproto/runtime"
	"github.com/chromedp/chromedp"
)

// One browser serves all browser tests; it starts with the first and is stopped by TestMain.
var (
	browser     context.Context
	stopBrowser = func() {}
	startOnce   sync.Once
	startErr    error
)

func TestMain(m *testing.M) {
	code := m.Run()
	stopBrowser()
	os.Exit(code)
}

func findBrowser() string {
	for _, name := range []string{"chromium", "chromium-browser", "google-chrome", "chrome"} {
		if path, err := exec.LookPath(name); err == nil {
			return path
		}
	}
	return ""
}

// tab opens a page of the report from disk at a width and collects everything that must not be: requests beyond the file, errors on the console.
type tab struct {
	t    testing.TB
	ctx  context.Context
	mu   sync.Mutex
	bad  []string
	path string
}

func openTab(t testing.TB, html []byte, width, height int64, before ...chromedp.Action[chromedp.Void]) *tab {
	t.Helper()
	exe := findBrowser()
	if exe == "" && os.Getenv("HEADFALL_BROWSER") == "required" {
		t.Fatal("no browser found, and one is required")
	}
	if exe == "" {
		t.Skip("no browser found: install chromium to run this test")
	}
	startOnce.Do(func() {
		dir, err := os.MkdirTemp("", "viz-browser-")
		if err != nil {
			startErr = err
			return
		}
		ctx, cancel := chromedp.NewExecAllocator(context.Background(), chromedp.ExecPath(exe), chromedp.UserDataDir(dir), chromedp.Headless, chromedp.NoSandbox,
			chromedp.DisableGPU, chromedp.NoFirstRun, chromedp.Flag("disable-quic", true), chromedp.Flag("disable-background-networking", true),
			chromedp.Flag("disable-component-update", true), chromedp.Flag("disable-sync", true), chromedp.Flag("hide-scrollbars", true),
			chromedp.Flag("disable-dev-shm-usage", true))
		first, cancelFirst := chromedp.NewContext(ctx)
		startErr = chromedp.Do(first)
		browser = first
		stopBrowser = func() { cancelFirst(); cancel(); os.RemoveAll(dir) }
	})
	if startErr != nil {
		t.Fatalf("the browser did not start: %v", startErr)
	}
	path := filepath.Join(t.TempDir(), "report.html")
	if err := os.WriteFile(path, html, 0o600); err != nil {
		t.Fatal(err)
	}
	ctx, cancel := chromedp.NewContext(browser)
	ctx, stop := context.WithTimeout(ctx, 2*time.Minute)
	t.Cleanup(func() { stop(); cancel() })
	b := &tab{t: t, ctx: ctx, path: path}
	b.do(chromedp.Func(func(ctx context.Context, s *chromedp.Target) error {
		if _, err := cdp.Call(ctx, s, network.Enable, network.EnableParams{}); err != nil {
			return err
		}
		_, err := cdp.Call(ctx, s, log.Enable, cdp.Empty{})
		return err
	}))
	if err := chromedp.Listen(ctx, b.listen); err != nil {
		t.Fatal(err)
	}
	b.do(chromedp.EmulateViewport(width, height))
	b.do(before...)
	b.do(chromedp.Navigate("file://" + path))
	return b
}

// listen notes what must not be.
func (b *tab) listen(ev any) {
	b.mu.Lock()
	defer b.mu.Unlock()
	switch e := ev.(type) {
	case *network.EventRequestWillBeSent:
		if u := e.Request.URL; !strings.HasPrefix(u, "file://"+b.path) && !strings.HasPrefix(u, "blob:") && !strings.HasPrefix(u, "data:") {
			b.bad = append(b.bad, "request "+u)
		}
	case *runtime.EventExceptionThrown:
		text := e.ExceptionDetails.Text
		if e.ExceptionDetails.Exception != nil {
			text += " " + e.ExceptionDetails.Exception.Description
		}
		b.bad = append(b.bad, text)
	case *runtime.EventConsoleAPICalled:
		words := string(e.Type)
		for _, a := range e.Args {
			words += " " + a.Description + string(a.Value)
		}
		b.bad = append(b.bad, "console "+words)
	case *log.EventEntryAdded:
		b.bad = append(b.bad, "log "+e.Entry.Text)
	}
}

// clean fails the test when something was noted.
func (b *tab) clean() {
	b.t.Helper()
	b.mu.Lock()
	defer b.mu.Unlock()
	for _, s := range b.bad {
		b.t.Errorf("the page must be quiet: %s", s)
	}
}

func (b *tab) do(steps ...chromedp.Action[chromedp.Void]) {
	b.t.Helper()
	if err := chromedp.Do(b.ctx, steps...); err != nil {
		b.t.Fatal(err)
	}
}

// get evaluates an expression in the page.
func get[T any](b *tab, expression string) T {
	b.t.Helper()
	v, err := chromedp.Run(b.ctx, chromedp.Evaluate[T](expression))
	if err != nil {
		b.t.Fatalf("%s: %v", expression, err)
	}
	return v
}

// until waits for an expression to become true.
func (b *tab) until(expression string) {
	b.t.Helper()
	for range 1500 {
		if get[bool](b, "!!("+expression+")") {
			return
		}
		time.Sleep(20 * time.Millisecond)
	}
	b.t.Fatalf("never came true: %s", expression)
}

func media(name, value string) chromedp.Action[chromedp.Void] {
	return chromedp.Func(func(ctx context.Context, s *chromedp.Target) error {
		_, err := cdp.Call(ctx, s, emulation.SetEmulatedMedia, emulation.SetEmulatedMediaParams{Features: []*emulation.MediaFeature{{Name: name, Value: value}}})
		return err
	})
}

func noScript() chromedp.Action[chromedp.Void] {
	return chromedp.Func(func(ctx context.Context, s *chromedp.Target) error {
		_, err := cdp.Call(ctx, s, emulation.SetScriptExecutionDisabled, emulation.SetScriptExecutionDisabledParams{Value: true})
		return err
	})
}

// keep saves a picture of the whole page for a look, when asked for.
func (b *tab) keep(name string) {
	dir := os.Getenv("VIZ_OUT")
	if dir == "" {
		return
	}
	png, err := chromedp.Run(b.ctx, chromedp.FullScreenshot(100))
	if err != nil {
		b.t.Fatal(err)
	}
	os.WriteFile(filepath.Join(dir, name), png, 0o644)
}
