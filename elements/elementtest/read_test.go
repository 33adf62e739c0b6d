package elementtest

import (
	"testing"

	"headfall/elements"
)

func TestReadRefuses(t *testing.T) {
	for _, s := range []string{"{a: 1", "{a}", "[1, 2", "{a: 1} b"} {
		if _, err := read(s); err == nil {
			t.Errorf("%s: taken", s)
		}
	}
}

func TestBuildRefuses(t *testing.T) {
	for _, s := range []string{"{length: 1 m}", "{length: 1 m, bore: 80, roughness: 0 mm}", "{length: 1 m, bore: 80 mm, roughness: 0 mm, colour: red}", "{length: -1 m, bore: 80 mm, roughness: 0 mm}"} {
		if _, err := Build(elements.Parts, "pipe", s); err == nil {
			t.Errorf("%s: taken", s)
		}
	}
	if _, err := Build(elements.Parts, "no_such", "{}"); err == nil {
		t.Error("an unknown kind is taken")
	}
}
