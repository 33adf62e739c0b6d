package viz

import (
	"math"
	"regexp"
	"strconv"
	"strings"
	"testing"
	"time"

	"headfall/network"
)

func TestToward(t *testing.T) {
	m := newUnits(network.Show{}).Level
	mm := newUnits(network.Show{Level: "mm"}).Level
	q := newUnits(network.Show{Flow: "L/s"}).Flow
	for _, c := range []struct {
		got, want string
	}{
		{m.Toward(2.9038, later), "2.91\u00a0m"},
		{m.Toward(2.9000000000001, later), "2.90\u00a0m"},
		{m.Toward(-0.0038, earlier), "−0.01\u00a0m"}, // a rim passed by a hair is passed
		{m.Toward(0.0038, earlier), "0\u00a0m"},
		{m.Toward(0.5038, near), "0.50\u00a0m"},
		{mm.Toward(0.0038, earlier), "3\u00a0mm"},
		{q.Toward(0.0049991, later), "5.00\u00a0L/s"},
		{q.Toward(0.0049991, earlier), "4.99\u00a0L/s"},
		{q.Toward(1e-16, later), "0\u00a0L/s"},
		{m.Toward(math.NaN(), later), none},
		{m.With(1e9), "1.00000·10⁹\u00a0m"},
	} {
		if c.got != c.want {
			t.Errorf("got %q, want %q", c.got, c.want)
		}
	}
}

func TestClock(t *testing.T) {
	day := clock{start: time.Date(2027, 10, 9, 22, 0, 0, 0, time.UTC), span: 36000}
	bare := clock{span: 36000}
	quick := clock{start: day.start, span: 300}
	for _, c := range []struct{ got, want string }{
		{day.At(119, earlier), "22:01"},
		{day.At(61, later), "22:02"},
		{day.At(60.0000001, later), "22:01"},
		{day.At(7200, earlier), "+1d 00:00"},
		{day.Both(7200, earlier), "+1d 00:00 (2\u00a0h)"},
		{bare.At(4800, earlier), "1\u00a0h 20\u00a0min"},
		{bare.Span(171, earlier), "2\u00a0min 51\u00a0s"},
		{bare.Span(-3660, later), "−1\u00a0h 1\u00a0min"},
		{quick.At(61.2, later), "22:01:02"},
		{clock{span: 2e-5}.At(1.5e-5, earlier), "1.50·10⁻⁵\u00a0s"},
		{bare.At(math.Inf(1), later), none},
	} {
		if c.got != c.want {
			t.Errorf("got %q, want %q", c.got, c.want)
		}
	}
}

// TestContrast holds every colour of words to 4.5 : 1 against both grounds, light and dark (WCAG 2.1, 1.4.3).
func TestContrast(t *testing.T) {
	css, js := asset("report.css"), asset("report.js")
	blocks := regexp.MustCompile(`(?s):root \{(.*?)\}`).FindAllStringSubmatch(css, 2)
	lists := regexp.MustCompile(`(?:LIGHT|DARK) = \[([^\]]*)\]`).FindAllStringSubmatch(js, -1)
	if len(blocks) != 2 || len(lists) != 2 {
		t.Fatal("the colours were not found")
	}
	for i, block := range blocks {
		colour := map[string]string{}
		for _, m := range regexp.MustCompile(`--(\w+): (#[0-9a-f]{6})`).FindAllStringSubmatch(block[1], -1) {
			colour[m[1]] = m[2]
		}
		words := []string{colour["ink"], colour["soft"], colour["bad"], colour["warn"], colour["good"], colour["water"]}
		for _, c := range strings.Split(lists[i][1], ",") {
			words = append(words, strings.Trim(c, ` "`))
		}
		for _, ground := range []string{colour["paper"], colour["sheet"]} {
			for _, w := range words {
				if r := contrast(t, w, ground); r < 4.5 {
					t.Errorf("%s on %s has a contrast of %.2f", w, ground, r)
				}
			}
		}
	}
}

func contrast(t *testing.T, a, b string) float64 {
	light := func(hex string) float64 {
		n, err := strconv.ParseUint(strings.TrimPrefix(hex, "#"), 16, 32)
		if err != nil {
			t.Fatal(err)
		}
		sum := 0.0
		for i, w := range []float64{0.2126, 0.7152, 0.0722} {
			c := float64(n>>(16-8*i)&255) / 255
			if c <= 0.04045 {
				c /= 12.92
			} else {
				c = math.Pow((c+0.055)/1.055, 2.4)
			}
			sum += w * c
		}
		return sum
	}
	x, y := light(a), light(b)
	return (math.Max(x, y) + 0.05) / (math.Min(x, y) + 0.05)
}
