package api

import (
	"context"
	"fmt"
	"log/slog"
	"math/rand/v2"
	"net/http"
	"runtime/debug"
	"time"

	"github.com/labstack/echo/v4"
)

const (
	headerRequestID = "X-Request-Id" // in canonical form, so that it is found without conversion
	maxRequestID    = 128
	maxLoggedPath   = 200
)

// identify gives every request an id: the caller's, where it is fit for a log
// line and a header, or a new one. It also sets the headers that every answer has.
func (s *Server) identify(next echo.HandlerFunc) echo.HandlerFunc {
	return func(c echo.Context) error {
		id := c.Request().Header.Get(headerRequestID)
		if !saneRequestID(id) {
			id = newRequestID()
		}
		h := c.Response().Header()
		h.Set(headerRequestID, id)
		h.Set(echo.HeaderXContentTypeOptions, "nosniff")
		if s.draining.Load() {
			h.Set(echo.HeaderConnection, "close")
		}
		return next(c)
	}
}

// saneRequestID accepts letters, digits and - _ . : only.
func saneRequestID(id string) bool {
	if id == "" || len(id) > maxRequestID {
		return false
	}
	for i := range len(id) {
		b := id[i]
		letter := 'a' <= b && b <= 'z' || 'A' <= b && b <= 'Z' || '0' <= b && b <= '9'
		if !letter && b != '-' && b != '_' && b != '.' && b != ':' {
			return false
		}
	}
	return true
}

// newRequestID is 128 random bits in hexadecimal. It names a request and
// protects nothing.
func newRequestID() string {
	var room [32]byte
	id := appendHex(room[:0], rand.Uint64())
	return string(appendHex(id, rand.Uint64()))
}

func appendHex(dst []byte, x uint64) []byte {
	const digits = "0123456789abcdef"
	for shift := 60; shift >= 0; shift -= 4 {
		dst = append(dst, digits[x>>shift&15])
	}
	return dst
}

func requestID(c echo.Context) string { return c.Response().Header().Get(headerRequestID) }

// log writes one line a request: neither body nor query nor address.
func (s *Server) log(next echo.HandlerFunc) echo.HandlerFunc {
	logger := s.config.Logger
	return func(c echo.Context) error {
		start := time.Now()
		if err := next(c); err != nil {
			c.Error(err) // writes the problem, so that status and size are known below
		}
		r := c.Response()
		level := levelOf(r.Status)
		if !logger.Enabled(context.Background(), level) {
			return nil
		}
		logger.LogAttrs(context.Background(), level, "request",
			slog.String("method", clip(c.Request().Method, 16)),
			slog.String("path", clip(c.Request().URL.Path, maxLoggedPath)),
			slog.Int("status", r.Status),
			slog.Int64("bytes", r.Size),
			slog.Duration("duration", time.Since(start)),
			slog.String("request_id", requestID(c)))
		return nil
	}
}

func levelOf(status int) slog.Level {
	if status >= http.StatusInternalServerError {
		return slog.LevelError
	}
	return slog.LevelInfo
}

// recover turns a panic into a problem and leaves its trace in the log.
func (s *Server) recover(next echo.HandlerFunc) echo.HandlerFunc {
	return func(c echo.Context) (err error) {
		defer func() {
			cause := recover()
			if cause == nil {
				return
			}
			if cause == http.ErrAbortHandler {
				panic(cause) // net/http's own way to drop a connection
			}
			s.config.Logger.Error("panic", "cause", fmt.Sprint(cause), "request_id", requestID(c), "trace", string(debug.Stack()))
			err = problem(internal, "The server met a fault of its own. The request id finds it in the log.")
		}()
		return next(c)
	}
}
