package viz

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"encoding/json"
	"flag"
	"math"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"
	"time"

	"headfall/network"
	"headfall/viz/export"
)

var update = flag.Bool("update", false, "write the golden files anew")

func render(t testing.TB, p Page) []byte {
	t.Helper()
	var b bytes.Buffer
	if err := Write(&b, p); err != nil {
		t.Fatal(err)
	}
	return b.Bytes()
}

// hostile is a plant whose every word tries to get out of its place.
func hostile(t testing.TB) Page {
	p := cascade(t)
	evil := `</script><script>window.pwned=1</script><img src=x onerror="window.pwned=1">'"&amp;` + "`${1}\u202e\u2066\u2028 שלום 🛢️ {{.}} %d "
	long := strings.Repeat("W", 200)
	p.Plant.Title, p.Plant.Revision, p.Plant.File, p.Plant.Case = evil+long, evil, evil, evil
	p.Plant.Text = evil + "\x00\x07" + long
	rename := map[string]string{"T-1": "T-1" + evil, "T-2": long, "HDR": evil + "h", "AIR": "👾" + evil}
	name := func(s string) string {
		if n, ok := rename[s]; ok {
			return n
		}
		return s
	}
	r := p.Result
	for old, now := range rename {
		for _, m := range []map[string][]float64{r.Series.Level, r.Series.Volume, r.Series.Gas} {
			if v, ok := m[old]; ok {
				m[now] = v
				delete(m, old)
			}
		}
		if v, ok := r.Vessels[old]; ok {
			r.Vessels[now] = v
			delete(r.Vessels, old)
		}
	}
	for _, v := range p.Plant.Vessels {
		v.Tag = name(v.Tag)
	}
	for _, x := range p.Plant.Tees {
		x.Tag = name(x.Tag)
	}
	for _, x := range p.Plant.Outside {
		x.Tag = name(x.Tag)
	}
	for _, l := range p.Plant.Lines {
		l.From, l.To = name(l.From), name(l.To)
	}
	for _, s := range r.Steps {
		s.Says, s.Who, s.Note, s.StopIf, s.Where = evil, evil, long, evil, evil
	}
	for _, l := range r.Limits {
		l.Says, l.Why, l.Of = evil, evil, []string{name(l.Of[0])}
	}
	for _, f := range r.Flags {
		f.Says, f.Do, f.Where, f.Kind = evil, evil, evil, evil
	}
	r.Cautions = []string{evil, long}
	r.LineUp[0].Valve, r.LineUp[0].Opens = evil, long
	return p
}

// odd are runs at the edges of what there can be.
func odd(t testing.TB) map[string]Page {
	empty := cascade(t)
	empty.Result = &network.Result{Program: network.Program{Name: "headfall"}, Verdict: network.NotJudged, Stopped: "failed", Trouble: "did not settle"}
	empty.Plant = &network.Plant{}
	none := cascade(t)
	none.Result.End = 0
	for _, m := range []map[string][]float64{none.Result.Series.Level, none.Result.Series.Flow, none.Result.Series.Volume, none.Result.Series.Gas,
		none.Result.Series.Opening, none.Result.Series.Running, none.Result.Series.Crest} {
		for k := range m {
			m[k] = m[k][:1]
		}
	}
	none.Result.Series.Time = []float64{0}
	none.Result.Series.TeeHead = nil
	tiny, huge := cascade(t), cascade(t)
	scaled(tiny, 1e-9)
	scaled(huge, 1e9)
	broken := cascade(t)
	for i := range broken.Result.Series.Level["T-1"] {
		if i%7 == 3 {
			broken.Result.Series.Level["T-1"][i] = math.NaN()
		}
		broken.Result.Series.Flow["L-1"][i] = math.Inf(1)
	}
	broken.Result.Vessels["T-1"].PeakLevel = math.NaN()
	broken.Result.Limits[0].Margin = ptr(math.Inf(-1))
	broken.Result.Lines["L-1"].PeakFlow = math.Inf(1)
	broken.Plant.Vessels[1].Shape = nil
	return map[string]Page{"empty": empty, "no length": none, "1e-9": tiny, "1e9": huge, "not finite": broken, "hostile": hostile(t)}
}

// scaled stretches time and every reading by f.
func scaled(p Page, f float64) {
	r := p.Result
	r.End *= f
	for i := range r.Series.Time {
		r.Series.Time[i] *= f
	}
	for _, m := range []map[string][]float64{r.Series.Level, r.Series.Flow, r.Series.Volume, r.Series.Gas, r.Series.Crest} {
		for _, v := range m {
			for i := range v {
				v[i] *= f
			}
		}
	}
	for _, v := range r.Vessels {
		v.StartLevel, v.PeakLevel, v.EndLevel, v.PeakAt = v.StartLevel*f, v.PeakLevel*f, v.EndLevel*f, v.PeakAt*f
	}
	for _, s := range r.Steps {
		*s.Done *= f
	}
}

func TestSameBytesTwice(t *testing.T) {
	for name, make := range map[string]func() Page{"cascade": func() Page { return cascade(t) }, "large": func() Page { return large(t, 120) }} {
		a, b := make(), make()
		b.Result.Work.Wall = 99
		if !bytes.Equal(render(t, a), render(t, b)) {
			t.Errorf("%s: two renderings of one plant differ", name)
		}
	}
}

// laws are words that belong to the elements, not to the page.
var laws = regexp.MustCompile(`(?s)<table class="laws">.*?</table>|<title>[^<]*</title>`)

// TestGolden pins the page without the chart library. Refresh with -update and say why in the commit.
func TestGolden(t *testing.T) {
	lib, err := echarts()
	if err != nil {
		t.Fatal(err)
	}
	for name, text := range map[string][]byte{
		"cascade.html": laws.ReplaceAll(bytes.Replace(render(t, cascade(t)), []byte(lib), []byte("…echarts…"), 1), nil),
		"cascade.txt":  sheetText(t, cascade(t)),
	} {
		path := filepath.Join("..", "testdata", "viz", name)
		if *update {
			if err := os.WriteFile(path, text, 0o644); err != nil {
				t.Fatal(err)
			}
		}
		want, err := os.ReadFile(path)
		if err != nil {
			t.Fatalf("%v; make it with -update", err)
		}
		if !bytes.Equal(want, text) {
			t.Errorf("%s differs from what is kept in testdata/viz; look at both, then -update", name)
		}
	}
}

func sheetText(t testing.TB, p Page) []byte {
	var b bytes.Buffer
	if err := SheetText(&b, p); err != nil {
		t.Fatal(err)
	}
	return b.Bytes()
}

func TestChartLibraryIsUnmodified(t *testing.T) {
	lib, err := echarts()
	if err != nil {
		t.Fatal(err)
	}
	if h := sha256.Sum256([]byte(lib)); hex.EncodeToString(h[:]) != echartsSHA256 {
		t.Errorf("echarts.common.min.js is not that of npm echarts 6.1.0: %x", h)
	}
	for _, words := range []string{"Apache License", "The Apache Software Foundation", "d3", "zrender", "tslib"} {
		if !strings.Contains(Notices(), words) {
			t.Errorf("the notices lack %q", words)
		}
	}
}

var dataIslands = regexp.MustCompile(`(?s)<script type="application/json"[^>]*>(.*?)</script>`)

// TestPages holds for every page, however odd: its data parse, nothing is fetched, no name became markup, one h1, and a word is never printed.
func TestPages(t *testing.T) {
	pages := odd(t)
	pages["cascade"], pages["large"], pages["studied"] = cascade(t), large(t, 120), studied(t)
	lib, _ := echarts()
	for name, p := range pages {
		t.Run(name, func(t *testing.T) {
			html := strings.Replace(string(render(t, p)), lib, "", 1)
			islands := dataIslands.FindAllStringSubmatch(html, -1)
			if len(islands) < 3 {
				t.Fatalf("%d islands of data", len(islands))
			}
			for _, m := range islands {
				if !json.Valid([]byte(m[1])) {
					t.Errorf("data that do not parse: %.200s", m[1])
				}
			}
			if strings.Count(html, "<h1") != 1 {
				t.Error("there must be one h1")
			}
			if strings.Contains(html, "<script>window") || strings.Contains(html, "<img") || strings.ContainsRune(html, '\u202e') {
				t.Error("a name became markup")
			}
			if strings.Contains(html, "NaN") && name != "hostile" && strings.Contains(strings.Replace(html, asset("report.js"), "", 1), "NaN") {
				t.Error("NaN was printed")
			}
			for _, m := range regexp.MustCompile(`(?:src|href|url\()\s*=?\s*["'(]?(https?:|//)[^"'\s>]*`).FindAllString(html, -1) {
				t.Errorf("the page points outside: %s", m)
			}
			if m := regexp.MustCompile(`(?i)\bsafe`).FindString(strings.ReplaceAll(html, Notices(), "")); m != "" {
				t.Errorf("the page says %q", m)
			}
			var sheet bytes.Buffer
			if err := WriteSheet(&sheet, p); err != nil {
				t.Error(err)
			}
			sheetText(t, p)
		})
	}
}

// TestNumbersEqualJSON compares what the page carries and prints with the JSON of the same result.
func TestNumbersEqualJSON(t *testing.T) {
	p := cascade(t)
	var js bytes.Buffer
	if err := export.JSON(&js, p.Result); err != nil {
		t.Fatal(err)
	}
	var whole, carried map[string]any
	if err := json.Unmarshal(js.Bytes(), &whole); err != nil {
		t.Fatal(err)
	}
	html := string(render(t, p))
	at := strings.Index(html, `id="result">`)
	end := strings.Index(html[at:], "</script>")
	if err := json.Unmarshal([]byte(html[at+len(`id="result">`):at+end]), &carried); err != nil {
		t.Fatal(err)
	}
	for key, v := range whole {
		if key == "series" || key == "work" {
			continue
		}
		a, _ := json.Marshal(v)
		b, _ := json.Marshal(carried[key])
		if !bytes.Equal(a, b) {
			t.Errorf("%s differs:\n%s\n%s", key, a, b)
		}
	}
	for _, x := range []string{"SUMP", "T-1"} {
		v := p.Result.Vessels[x]
		if !strings.Contains(html, "<td class=\"n\">"+newUnits(p.Plant.Show).Level.Toward(v.PeakLevel, later)+"</td>") {
			t.Errorf("the headroom table lacks the peak of %s, %g m", x, v.PeakLevel)
		}
	}
}

func TestSizeOfALargePlant(t *testing.T) {
	p := large(t, 10) // 40 vessels, 60 lines, 24 h every 10 s
	begin := time.Now()
	n := len(render(t, p))
	t.Logf("%d vessels, %d lines, %d samples: %d bytes in %v", len(p.Plant.Vessels), len(p.Plant.Lines), len(p.Result.Series.Time), n, time.Since(begin))
	if n > 4<<20 {
		t.Errorf("the page has %d bytes, more than 4 MiB", n)
	}
}
