package viz

import (
	"bytes"
	"os"
	"testing"
)

func render(t testing.TB, p Page) []byte {
	t.Helper()
	var b bytes.Buffer
	if err := Write(&b, p); err != nil {
		t.Fatal(err)
	}
	return b.Bytes()
}

func TestWriteOut(t *testing.T) {
	if os.Getenv("VIZ_OUT") == "" {
		t.Skip()
	}
	os.WriteFile(os.Getenv("VIZ_OUT")+"/cascade.html", render(t, cascade(t)), 0o644)
	os.WriteFile(os.Getenv("VIZ_OUT")+"/large.html", render(t, large(t, 10)), 0o644)
}
