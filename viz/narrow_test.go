package viz

import "testing"

// On a telephone the drawing opens where the vessels stand, the headroom and its verdict are read without moving anything sideways, and no row of a table
// is stretched by a column that has no room.
func TestNarrowWindow(t *testing.T) {
	for name, p := range map[string][]byte{"cascade": render(t, cascade(t)), "large": render(t, large(t, 40))} {
		b := openTab(t, p, 360, 800)
		if n := get[int](b, `(function () {
			var f = document.getElementById("elevation").getBoundingClientRect(), n = 0;
			JSON.parse(document.getElementById("live").textContent).vessels.forEach(function (v) {
				var r = document.getElementById(v.id).getBoundingClientRect();
				if (r.left >= f.left - 1 && r.right <= f.right + 1) n++;
			});
			return n;
		})()`); n == 0 {
			t.Errorf("%s: no vessel is in sight", name)
		}
		if over := get[int](b, `(function () { var e = document.querySelector(".headroom").parentNode; return e.scrollWidth - e.clientWidth; })()`); over > 0 {
			t.Errorf("%s: the headroom is %d px wider than the window", name, over)
		}
		if high := get[float64](b, `Math.max.apply(null, Array.from(document.querySelectorAll(".wide:not(details *) tr")).map(function (r) { return r.getBoundingClientRect().height; }))`); high > 260 {
			t.Errorf("%s: a row is %.0f px high", name, high)
		}
		b.clean()
	}
}
