package api

import (
	"context"
	"errors"
	"log/slog"
	"net"
	"net/http"
	"sync/atomic"
	"time"

	"github.com/labstack/echo/v4"

	"regimed/api/store"
	"regimed/regime/input"
	"regimed/regime/kind"
)

// Config holds what an operator may set. The zero value of a field stands for
// the default that its comment names.
type Config struct {
	Logger            *slog.Logger  // access log and faults; none: silent
	BodyLimit         int64         // largest request body in bytes; 1 MiB
	SweepLimit        int64         // most points of a sweep in one request; a million
	ReadHeaderTimeout time.Duration // 5 s
	ReadTimeout       time.Duration // 15 s, header and body together
	WriteTimeout      time.Duration // 30 s
	IdleTimeout       time.Duration // 120 s
	StreamIdleTimeout time.Duration // of a batch, which has no other: how long it may stand still; 60 s
	DrainDelay        time.Duration // from "not ready" to the end of accepting; none
	ShutdownTimeout   time.Duration // for requests in flight; 15 s. A batch is told to end after half of it

	Records  store.Store               // keeps answers; none: the paths of records say that they are off
	Clock    func() time.Time          // when a record is made; time.Now
	MayWrite func(*http.Request) error // refuses those who may not make or delete records; none: everybody may

	FrameAncestors []string // who may show embedded records in a frame, as [FrameAncestors] reads it; nobody
	PublicURL      string   // under which people reach the service, for links that leave it; the Host of the request
}

// Limits that no operator has a reason to change.
const (
	defaultBodyLimit  = 1 << 20
	defaultSweepLimit = 1_000_000
	maxHeaderBytes    = 32 << 10
)

func (c Config) withDefaults() Config {
	if c.Logger == nil {
		c.Logger = slog.New(slog.DiscardHandler)
	}
	if c.Clock == nil {
		c.Clock = time.Now
	}
	if c.BodyLimit <= 0 {
		c.BodyLimit = defaultBodyLimit
	}
	if c.SweepLimit <= 0 {
		c.SweepLimit = defaultSweepLimit
	}
	orDefault(&c.ReadHeaderTimeout, 5*time.Second)
	orDefault(&c.ReadTimeout, 15*time.Second)
	orDefault(&c.WriteTimeout, 30*time.Second)
	orDefault(&c.IdleTimeout, 120*time.Second)
	orDefault(&c.StreamIdleTimeout, 60*time.Second)
	orDefault(&c.ShutdownTimeout, 15*time.Second)
	return c
}

func orDefault(d *time.Duration, otherwise time.Duration) {
	if *d <= 0 {
		*d = otherwise
	}
}

// Server answers requests. It is safe for concurrent use.
type Server struct {
	config   Config
	echo     *echo.Echo
	schema   *input.Schema
	fixed    documents
	spaces   spacePool
	draining atomic.Bool

	streams    context.Context // ends when no stream may go on reading
	endStreams context.CancelFunc
	ancestors  string // who may frame a page, as the policy has it
	publicURL  string // without a slash at its end; empty: not set
}

// New makes a server. Everything that does not depend on a request is written
// once, here.
func New(config Config) *Server {
	s := &Server{config: config.withDefaults(), echo: echo.New(), schema: kind.Schema()}
	s.configureEmbedding()
	s.fixed = newDocuments()
	s.streams, s.endStreams = context.WithCancel(context.Background())
	s.echo.HTTPErrorHandler = s.answerError
	// An address is neither logged nor trusted: behind a proxy it would be
	// the proxy's, and in a forwarded header it is whatever a caller says.
	s.echo.IPExtractor = echo.ExtractIPDirect()
	s.echo.Use(s.identify, s.log, s.recover)
	s.routes()
	return s
}

// Handler returns the handler of all routes.
func (s *Server) Handler() http.Handler { return s.echo }

// HTTPServer returns a server of net/http with the timeouts of the
// configuration, ready to serve.
func (s *Server) HTTPServer() *http.Server {
	return &http.Server{
		Handler:           s.echo,
		ReadHeaderTimeout: s.config.ReadHeaderTimeout,
		ReadTimeout:       s.config.ReadTimeout,
		WriteTimeout:      s.config.WriteTimeout,
		IdleTimeout:       s.config.IdleTimeout,
		MaxHeaderBytes:    maxHeaderBytes,
		ErrorLog:          slog.NewLogLogger(s.config.Logger.Handler(), slog.LevelWarn),
	}
}

// Run serves connections of the listener until the context ends, then stops
// without losing a request: it says that it is not ready and closes
// connections after their answer, waits for the balancer to notice, and only
// then stops accepting.
func (s *Server) Run(ctx context.Context, listener net.Listener) error {
	server := s.HTTPServer()
	failed := make(chan error, 1)
	go func() { failed <- server.Serve(listener) }()
	select {
	case err := <-failed:
		return err
	case <-ctx.Done():
	}
	s.Drain()
	wait(s.config.DrainDelay, failed)
	limit, cancel := context.WithTimeout(context.Background(), s.config.ShutdownTimeout)
	defer cancel()
	// A stream could outlast any limit. It gets half of this one to come to its
	// end, and the other half to answer what it has read and to say how far it came.
	defer time.AfterFunc(s.config.ShutdownTimeout/2, s.endStreams).Stop()
	if err := server.Shutdown(limit); err != nil {
		return errors.Join(err, server.Close())
	}
	return nil
}

func wait(d time.Duration, failed <-chan error) {
	if d <= 0 {
		return
	}
	timer := time.NewTimer(d)
	defer timer.Stop()
	select {
	case <-timer.C:
	case <-failed:
	}
}

// Drain makes the server say that it is not ready, and close each connection
// after its next answer.
func (s *Server) Drain() { s.draining.Store(true) }
