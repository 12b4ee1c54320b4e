// Package page holds the case sheet, the page on which a case is built by hand,
// as files that never change while a program runs. What stands on it comes from
// the catalogue and the schema of a case, which the page asks the service for.
package page

import (
	"crypto/sha256"
	"embed"
	"encoding/hex"
	"io/fs"
	"path"
	"strings"
	"sync"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"

	"regimed/testdata/cases"
)

// Policy is the Content-Security-Policy of the page: its own scripts, styles and
// pictures, requests to its own service, and nothing else.
const Policy = "default-src 'none'; script-src 'self'; style-src 'self'; img-src 'self' data:; connect-src 'self'; " +
	"base-uri 'none'; form-action 'none'; frame-ancestors 'none'; require-trusted-types-for 'script'; trusted-types 'none'"

// File is one file of the page.
type File struct {
	Name      string
	MediaType string
	Body      []byte
	Tag       string // strong entity tag, in quotes: it changes when the body does
}

func file(name, mediaType string, body []byte) File {
	sum := sha256.Sum256(body)
	return File{name, mediaType, body, `"` + hex.EncodeToString(sum[:12]) + `"`}
}

//go:embed sheet
var embedded embed.FS

// index is the name of the page itself among its files.
const index = "index.html"

// mediaTypes are those of the files, by extension.
var mediaTypes = map[string]string{
	".html": "text/html; charset=utf-8",
	".css":  "text/css; charset=utf-8",
	".js":   "text/javascript; charset=utf-8",
	".svg":  "image/svg+xml",
}

// Files are the files that the page is made of, by name.
var Files = sync.OnceValue(func() map[string]File {
	all := map[string]File{}
	each(embedded, "sheet", func(name string, body []byte) {
		all[name] = file(name, mediaTypes[path.Ext(name)], body)
	})
	return all
})

// Index is the page itself.
func Index() File { return Files()[index] }

// Example is a demo case as the page offers it.
type Example struct {
	Name string         `json:"name"`
	Case jsontext.Value `json:"case"`
}

// Examples is the list of demo cases as JSON, by name.
var Examples = sync.OnceValue(func() File {
	var list struct {
		Examples []Example `json:"examples"`
	}
	each(cases.Files, ".", func(name string, body []byte) {
		list.Examples = append(list.Examples, Example{strings.TrimSuffix(name, ".json"), body})
	})
	body, err := json.Marshal(list, jsontext.Multiline(false))
	if err != nil {
		panic("page: a demo case is no JSON: " + err.Error()) // any test that asks for the list would find it
	}
	return file("examples.json", "application/json; charset=utf-8", append(body, '\n'))
})

// each calls do for every file of a folder, by name. The folders are part of
// the program, so that reading them can't fail.
func each(folder fs.FS, dir string, do func(name string, body []byte)) {
	entries, err := fs.ReadDir(folder, dir)
	if err != nil {
		panic("page: " + err.Error())
	}
	for _, e := range entries {
		body, err := fs.ReadFile(folder, path.Join(dir, e.Name()))
		if err != nil {
			panic("page: " + err.Error())
		}
		do(e.Name(), body)
	}
}
