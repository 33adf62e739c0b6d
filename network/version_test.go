package network

import "testing"

func TestVersionIsThatOfTheBuild(t *testing.T) {
	for main, want := range map[string]string{"v1.2.3": "1.2.3", "v0.0.0-20270309101112-0123456789ab+dirty": "0.0.0-20270309101112-0123456789ab+dirty", "(devel)": devel, "": devel} {
		if got := versionOf(main); got != want {
			t.Errorf("%q gives %q, want %q", main, got, want)
		}
	}
}
