// Package swagger holds the page that shows the HTTP interface: swagger-ui
// 5.35.0 as its npm package swagger-ui-dist has it (Apache License 2.0; LICENSE,
// NOTICE and the notices of what it bundles lie beside it), without its map
// files, and a page of our own around it. Everything is served from here.
package swagger

import (
	"crypto/sha256"
	_ "embed" // for the files
	"encoding/hex"
)

// File is one file of the page.
type File struct {
	Path      string // "/docs/page.js"
	MediaType string
	Body      []byte
	ETag      string
}

//go:embed index.html
var index []byte

//go:embed page.css
var style []byte

//go:embed page.js
var script []byte

//go:embed vendored/swagger-ui-bundle.js
var bundle []byte

//go:embed vendored/swagger-ui.css
var bundleStyle []byte

// Policy is the Content-Security-Policy of the page. The vendored part sets
// styles from its script, which needs 'unsafe-inline' for styles alone.
const Policy = "default-src 'none'; script-src 'self'; style-src 'self' 'unsafe-inline'; img-src 'self' data:; connect-src 'self'; base-uri 'none'; form-action 'none'; frame-ancestors 'none'"

// Files lists the files of the page.
func Files() []File {
	return []File{
		file("/docs", "text/html; charset=utf-8", index),
		file("/docs/page.css", "text/css; charset=utf-8", style),
		file("/docs/page.js", "text/javascript; charset=utf-8", script),
		file("/docs/swagger-ui-bundle.js", "text/javascript; charset=utf-8", bundle),
		file("/docs/swagger-ui.css", "text/css; charset=utf-8", bundleStyle),
	}
}

func file(path, mediaType string, body []byte) File {
	sum := sha256.Sum256(body)
	return File{Path: path, MediaType: mediaType, Body: body, ETag: `"` + hex.EncodeToString(sum[:16]) + `"`}
}
