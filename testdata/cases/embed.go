// Package cases holds the demo cases, for the programs that show them. The
// scenario is invented.
package cases

import "embed"

// Files are the cases in JSON, one a file.
//
//go:embed *.json
var Files embed.FS
