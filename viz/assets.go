package viz

import (
	"bytes"
	"compress/gzip"
	"crypto/sha256"
	"embed"
	"encoding/base64"
	"io"
	"sync"
)

//go:embed assets/*.tmpl assets/report.css assets/sheet.css assets/report.js assets/LICENSES.txt assets/echarts.common.min.js.gz
var assets embed.FS

// echartsSHA256 is the hash of dist/echarts.common.min.js of npm echarts 6.1.0, as published.
const echartsSHA256 = "61f13280aba3161f77fc801bf5f9c786f55f10432153a0683fc5cc0700b013d5"

// echarts returns the chart library, unmodified.
var echarts = sync.OnceValues(func() (string, error) {
	raw, err := assets.ReadFile("assets/echarts.common.min.js.gz")
	if err != nil {
		return "", err
	}
	z, err := gzip.NewReader(bytes.NewReader(raw))
	if err != nil {
		return "", err
	}
	text, err := io.ReadAll(z)
	return string(text), err
})

func asset(name string) string {
	b, err := assets.ReadFile("assets/" + name)
	if err != nil {
		panic(err) // embedded: it is there or the program does not build
	}
	return string(b)
}

// Notices returns the notices of the third-party work that a report carries.
func Notices() string { return asset("LICENSES.txt") }

// cspHash is the source expression that lets one inline script run.
func cspHash(script string) string {
	h := sha256.Sum256([]byte(script))
	return "'sha256-" + base64.StdEncoding.EncodeToString(h[:]) + "'"
}
