package main

import (
	"bytes"
	"errors"
	"io"
	"strings"

	"github.com/go-json-experiment/json/jsontext"
)

// lines says on which lines of a file the value of a JSON Pointer stands; more
// than one where a name is given more than once.
type lines map[string][]int

func (l lines) add(pointer string, line int) {
	l[pointer] = append(l[pointer], line)
}

// find returns the line of a pointer, of the nearest object around it where it
// is missing itself, and 0 where nothing is known. nth counts from 0 where a
// name is given more than once.
func (l lines) find(pointer string, nth int) int {
	for {
		if list := l[pointer]; len(list) > 0 {
			return list[min(nth, len(list)-1)]
		}
		i := strings.LastIndexByte(pointer, '/')
		if i < 0 {
			return 0
		}
		pointer, nth = pointer[:i], 0
	}
}

// linesOfJSON finds the line of every value of a JSON document, as far as it
// is JSON.
func linesOfJSON(data []byte) (lines, error) {
	at := lines{}
	dec := jsontext.NewDecoder(bytes.NewBuffer(data), jsontext.AllowDuplicateNames(true))
	line, done := 1, 0
	for {
		token, err := dec.ReadToken()
		if errors.Is(err, io.EOF) {
			return at, nil
		}
		if err != nil {
			return at, err
		}
		end := int(dec.InputOffset())
		line += bytes.Count(data[done:end], []byte{'\n'})
		done = end
		if kind := token.Kind(); kind == '}' || kind == ']' {
			continue
		}
		pointer := string(dec.StackPointer())
		if isValueOfMember(dec) {
			continue // its name was recorded
		}
		at.add(pointer, line)
	}
}

// isValueOfMember reports whether the token that was read last is, or opens,
// the value of a member rather than its name or an element.
func isValueOfMember(dec *jsontext.Decoder) bool {
	depth := dec.StackDepth()
	kind, length := dec.StackIndex(depth)
	if length == 0 && depth > 0 { // an object or array has just been opened
		kind, length = dec.StackIndex(depth - 1)
	}
	return kind == '{' && length%2 == 0
}

// lineOfOffset counts the line on which a byte stands, from 1.
func lineOfOffset(data []byte, offset int64) int {
	n := min(max(offset, 0), int64(len(data)))
	return 1 + bytes.Count(data[:n], []byte{'\n'})
}

// escapePointer writes a name as one step of a JSON Pointer (RFC 6901).
func escapePointer(name string) string {
	return strings.NewReplacer("~", "~0", "/", "~1").Replace(name)
}
