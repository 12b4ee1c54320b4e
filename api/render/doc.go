// Package render writes the record of a classified case for those who read it:
// JSON for pipelines, and a page of text for people. All prose is born here,
// from records; a rendering decides nothing.
package render
