package main

import (
	"bufio"
	"bytes"
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"strings"
	"sync/atomic"

	"github.com/klauspost/compress/gzip"

	"regimed/api/batch"
)

// batchInput is a stream of cases that is read.
type batchInput struct {
	io.Reader // unpacked
	info      os.FileInfo
	size      int64 // of the file; 0 where it is not known
	read      atomic.Int64
	unblock   func() // nil where no read waits for long
	close     func() error
}

// gzipMark is how a stream in gzip begins, and no line of JSON does.
var gzipMark = []byte{0x1f, 0x8b}

// openBatch opens a file, or standard input for "-".
func openBatch(name string, stdin io.Reader) (*batchInput, error) {
	in := &batchInput{close: func() error { return nil }}
	from := stdin
	if name != "-" {
		file, err := os.Open(name)
		if err != nil {
			return nil, err
		}
		from, in.close = file, file.Close
	}
	in.look(from)
	if in.size == 0 { // a terminal, a pipe: a read may wait for ever
		from, in.unblock = letGo(from)
	}
	head := bufio.NewReader(&countedReader{from, &in.read})
	in.Reader = head
	start, err := head.Peek(len(gzipMark))
	if err != nil || !bytes.Equal(start, gzipMark) {
		return in, nil // what there is to an error, the first read will say
	}
	if in.Reader, err = gzip.NewReader(head); err != nil {
		return nil, errors.Join(fmt.Errorf("%s: it begins as gzip and is none: %w", inputName(name), err), in.close())
	}
	return in, nil
}

// inputName is how messages call an input.
func inputName(name string) string {
	if name == "-" {
		return "(standard input)"
	}
	return name
}

// look finds out what is read: the size of a plain file is known.
func (in *batchInput) look(from io.Reader) {
	file, isFile := from.(*os.File)
	if !isFile {
		return
	}
	info, err := file.Stat()
	if err == nil && info.Mode().IsRegular() {
		in.info, in.size = info, info.Size()
	}
}

// letGo returns a reader that can be told to let go while it waits for another
// one, and what tells it.
func letGo(from io.Reader) (io.Reader, func()) {
	r, w := io.Pipe()
	go func() {
		_, err := io.Copy(w, from)
		w.CloseWithError(err)
	}()
	return r, func() { w.CloseWithError(os.ErrClosed) }
}

type countedReader struct {
	from io.Reader
	read *atomic.Int64
}

func (c *countedReader) Read(p []byte) (int, error) {
	n, err := c.from.Read(p)
	c.read.Add(int64(n))
	return n, err
}

// batchOutput is a stream of answers that is written.
type batchOutput struct {
	lines  *bufio.Writer
	packer *gzip.Writer // nil where the output is not packed
	file   *os.File     // nil for standard output
	// commit makes way for the first line of a run that goes on: until then
	// the former output stays as it was. discard does without.
	commit, discard func() error
}

const outputBuffer = 64 << 10

func (f *batchFlags) isPacked() bool { return strings.EqualFold(filepath.Ext(f.out), ".gz") }

// open opens the output at its beginning, or behind what it holds already.
func (f *batchFlags) open(stdout io.Writer, in *batchInput) (*batchOutput, *batch.Past, error) {
	if f.out == "" {
		return &batchOutput{lines: bufio.NewWriterSize(stdout, outputBuffer)}, nil, nil
	}
	if info, err := os.Stat(f.out); err == nil && in.info != nil && os.SameFile(info, in.info) {
		return nil, nil, fmt.Errorf("%s is the input and can't be the output too", f.out)
	}
	former, err := f.former()
	if err != nil {
		return nil, nil, err
	}
	if former == nil {
		file, err := os.Create(f.out)
		return newBatchOutput(file, f.isPacked()), nil, err
	}
	goOn := f.goOnPlain
	if f.isPacked() {
		goOn = f.goOnPacked
	}
	out, past, err := goOn(former)
	if err != nil {
		return nil, nil, errors.Join(fmt.Errorf("%s can't be gone on with: %w", f.out, err), former.Close())
	}
	return out, past, nil
}

// former is the output to go on with; nil where there is none.
func (f *batchFlags) former() (*os.File, error) {
	if !f.resume {
		return nil, nil
	}
	file, err := os.OpenFile(f.out, os.O_RDWR, 0)
	if errors.Is(err, os.ErrNotExist) {
		return nil, nil
	}
	return file, err
}

func newBatchOutput(to *os.File, packed bool) *batchOutput {
	o := &batchOutput{file: to}
	var w io.Writer = to
	if packed {
		o.packer, _ = gzip.NewWriterLevel(to, gzip.BestSpeed) // its only error is a level that there is not
		w = o.packer
	}
	o.lines = bufio.NewWriterSize(w, outputBuffer)
	return o
}

// goOnPlain goes on in the file itself.
func (f *batchFlags) goOnPlain(former *os.File) (*batchOutput, *batch.Past, error) {
	past, err := batch.ReadPast(former, f.shard, nil)
	if err != nil {
		return nil, nil, err
	}
	out := newBatchOutput(former, false)
	out.commit = func() error {
		_, err := former.Seek(past.Length, io.SeekStart)
		return errors.Join(former.Truncate(past.Length), err)
	}
	return out, past, nil
}

// goOnPacked packs what there is once more into a file beside it, which takes
// its place: a packed stream has to be the same from its beginning to come out
// the same.
func (f *batchFlags) goOnPacked(former *os.File) (*batchOutput, *batch.Past, error) {
	beside, err := os.Create(f.out + ".resumed")
	if err != nil {
		return nil, nil, err
	}
	out := newBatchOutput(beside, true)
	out.commit = func() error { return errors.Join(os.Rename(beside.Name(), f.out), former.Close()) }
	out.discard = func() error { return errors.Join(os.Remove(beside.Name()), former.Close()) }
	past, err := readPacked(former, f.shard, out.lines)
	if err != nil {
		return nil, nil, errors.Join(err, os.Remove(beside.Name()), beside.Close())
	}
	return out, past, nil
}

// readPacked reads a packed output as far as it is whole, and keeps it line by
// line, as it was written.
func readPacked(former io.Reader, s batch.Shard, keep io.Writer) (*batch.Past, error) {
	unpacked, err := gzip.NewReader(former)
	if errors.Is(err, io.EOF) || errors.Is(err, io.ErrUnexpectedEOF) {
		return &batch.Past{}, nil // it was cut off within its head
	}
	if err != nil {
		return nil, err
	}
	return batch.ReadPast(unpacked, s, func(line []byte) error {
		_, err := keep.Write(line)
		return err
	})
}

func (o *batchOutput) Write(p []byte) (int, error) {
	if o.commit != nil {
		commit := o.commit
		o.commit, o.discard = nil, nil
		if err := commit(); err != nil {
			return 0, err
		}
	}
	return o.lines.Write(p)
}

// Flush sends on what was written. A packed file is left alone: how it is packed
// must not depend on when it was flushed.
func (o *batchOutput) Flush() error {
	if o.packer != nil {
		return nil
	}
	return o.lines.Flush()
}

// Close ends the output.
func (o *batchOutput) Close() error {
	if o.commit != nil { // nothing was written: the former output stays
		if o.discard == nil {
			return o.file.Close()
		}
		return errors.Join(o.discard(), o.file.Close())
	}
	err := o.lines.Flush()
	if o.packer != nil {
		err = errors.Join(err, o.packer.Close())
	}
	if o.file != nil {
		err = errors.Join(err, o.file.Close())
	}
	return err
}
