// Package batchtest makes batches of any length for tests and benchmarks: shipped
// cases with a dimension varied from line to line, and one broken line among a
// hundred.
package batchtest

import (
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
)

// Limit is the longest line under which a batch has its one kind of broken
// lines that are too long.
const Limit = 4 << 10

// files are shipped cases that take little time to answer, of ten kinds.
var files = []string{"race-liner", "suction-tube", "sampler-tube", "roll-tank", "vent-disc", "weed-strip", "drift-buoy",
	"signal-post", "intake-staff", "sluice-skin", "lock-main", "wave-bar", "dolphin-pile", "landing-pontoon", "louvre-blade"}

// Source makes the lines.
type Source struct{ cases []template }

// template is a case with a gap where its title stands and one where a length
// does.
type template struct {
	text        [3]string
	title, unit string
	length      float64
}

// New reads the shipped cases of a folder.
func New(folder string) (*Source, error) {
	s := &Source{}
	for _, name := range files {
		text, err := os.ReadFile(filepath.Join(folder, name+".json"))
		if err != nil {
			return nil, err
		}
		t, err := cut(text)
		if err != nil {
			return nil, fmt.Errorf("%s: %w", name, err)
		}
		s.cases = append(s.cases, t)
	}
	return s, nil
}

var (
	titleOf  = regexp.MustCompile(`"title":"([^"\\]*)"`)
	lengthOf = regexp.MustCompile(`"(?:diameter|length|width|height|depth|chord|radius)":"([0-9.]+) (m|mm|cm)"`)
)

func cut(text []byte) (template, error) {
	var line bytes.Buffer
	if err := json.Compact(&line, text); err != nil {
		return template{}, err
	}
	whole := line.String()
	title, length := titleOf.FindStringSubmatchIndex(whole), lengthOf.FindStringSubmatchIndex(whole)
	if title == nil || length == nil || length[2] < title[3] {
		return template{}, errors.New("no title, or no length behind it")
	}
	x, err := strconv.ParseFloat(whole[length[2]:length[3]], 64)
	return template{
		text:  [3]string{whole[:title[2]], whole[title[3]:length[2]], whole[length[5]:]},
		title: whole[title[2]:title[3]], unit: whole[length[4]:length[5]], length: x,
	}, err
}

// Append appends a line, numbered from 1, without its end. It reports whether
// the line is broken.
func (s *Source) Append(dst []byte, number int64) (line []byte, broken bool) {
	if number%100 == 37 {
		return s.appendBroken(dst, number), true
	}
	return s.appendCase(dst, number, "", ""), false
}

// Title is how the title of a line that is not broken ends.
func Title(number int64) string { return fmt.Sprintf(", line %d", number) }

func (s *Source) appendCase(dst []byte, number int64, intoTitle, behindUnit string) []byte {
	c := &s.cases[number%int64(len(s.cases))]
	dst = append(dst, c.text[0]...)
	dst = append(append(append(dst, c.title...), intoTitle...), Title(number)...)
	dst = append(dst, c.text[1]...)
	dst = strconv.AppendFloat(dst, c.length*(1+1e-3*float64(number%97)), 'g', 8, 64)
	dst = append(append(append(dst, ' '), c.unit...), behindUnit...)
	return append(dst, c.text[2]...)
}

// Breakages is the number of ways in which a line is broken.
const Breakages = 8

// appendBroken appends a line that is broken in one of several ways, in turn.
func (s *Source) appendBroken(dst []byte, number int64) []byte {
	switch number / 100 % Breakages {
	case 0: // cut off
		whole := s.appendCase(nil, number, "", "")
		return append(dst, whole[:len(whole)-7]...)
	case 1:
		return s.appendCase(dst, number, "", "ubits")
	case 2:
		return fmt.Appendf(dst, `{"title":"line %d","structure":{"length":"2 m"},"fluid":"water"}`, number)
	case 3:
		return s.appendCase(dst, number, strings.Repeat("long ", Limit/5), "")
	case 4:
		return s.appendCase(dst, number, "\xff\xfe", "")
	case 5:
		return fmt.Appendf(dst, `{"structure":{"kind":"cilinder","diameter":"%d mm"}}`, number)
	case 6: // several mistakes
		return fmt.Appendf(dst, `{"structure":{"kind":"cylinder","diameter":%d,"lenght":"2 m"},"fluid":{"name":"watre"},"flow":{"speed":"1 kg"}}`, number)
	default: // no object
		return fmt.Appendf(dst, `["line",%d]`, number)
	}
}

// Reader reads so many lines of the batch, made as they are read.
func (s *Source) Reader(lines int64) io.Reader { return &reader{source: s, last: lines} }

type reader struct {
	source     *Source
	next, last int64
	rest, room []byte
}

func (r *reader) Read(p []byte) (int, error) {
	if len(r.rest) == 0 {
		if r.next == r.last {
			return 0, io.EOF
		}
		r.next++
		r.room, _ = r.source.Append(r.room[:0], r.next)
		r.room = append(r.room, '\n')
		r.rest = r.room
	}
	n := copy(p, r.rest)
	r.rest = r.rest[n:]
	return n, nil
}
