package cli

import (
	"bytes"
	"os"
	"strings"
	"testing"

	"headfall/elements"
)

const kindsPage = "../../../elements/KINDS.md"

// The page of laws in the tree is what kinds --markdown writes now, and leaves no kind out.
func TestKindsPageIsCurrent(t *testing.T) {
	kinds, err := kindsNamed(nil)
	if err != nil {
		t.Fatal(err)
	}
	var b bytes.Buffer
	writeMarkdown(&b, kinds)
	if *update {
		if err := os.WriteFile(kindsPage, b.Bytes(), 0o666); err != nil {
			t.Fatal(err)
		}
	}
	got, err := os.ReadFile(kindsPage)
	if err != nil {
		t.Fatal(err)
	}
	if !bytes.Equal(got, b.Bytes()) {
		t.Error("elements/KINDS.md is not what kinds --markdown writes (go test ./cmd/internal/cli -run KindsPage -update)")
	}
	for _, room := range elements.Rooms() {
		for _, k := range elements.Kinds(room) {
			if !strings.Contains(string(got), "\n### "+k.Name+"\n\n"+k.Doc+"\n") || k.Source != "" && !strings.Contains(string(got), "\nSource: "+strings.Join(strings.Fields(k.Source), " ")+"\n") {
				t.Errorf("%s is not on the page with its source", k.Name)
			}
		}
	}
}
