package main

import (
	"fmt"
	"log/slog"
	"net"
	"os"
	"os/signal"
	"syscall"
	"time"

	"github.com/spf13/cobra"

	"regimed/api"
)

func newServe() *cobra.Command {
	var listen, data string
	var config api.Config
	cmd := &cobra.Command{
		Use:   "serve",
		Short: "Answer cases over HTTP",
		Long: `Serves what the commands do over HTTP: cases, batches, sweeps, maps,
comparisons, scalings, the catalogues and the canonical solutions. In a browser,
/ is a page on which to build a case, and /docs shows the operations; the
contract stands at /openapi.yaml.

With --data it keeps answers that are posted to /v1/records, in the file
records.db of that directory, and gives each a permanent address. Without, the
paths of records say that they are off.

Pages of others may show a record in a frame, at /embed/ID, only where
--frame-ancestors names their origin; its pictures anybody may show. Behind a
proxy, --public-url is the address that people use, for links to records.

On SIGTERM or an interrupt it stops without losing a request: /readyz says 503,
every connection closes after its next answer, and when --drain is over the
server stops accepting and finishes what it has begun; a batch is told to end
after half of --shutdown-timeout, and says how far it came. A second signal ends it at
once.`,
		Example: `  regimed serve
  regimed serve --listen 0.0.0.0:8610 --drain 10s
  regimed serve --data /var/lib/regimed
  regimed serve --data records --public-url https://regimed.example --frame-ancestors https://wiki.example
  curl -d @riser.json -H 'Content-Type: application/json' localhost:8610/v1/classify`,
		Args: arguments(0, 0, "serve takes only flags"),
		RunE: func(cmd *cobra.Command, _ []string) error {
			if err := checkEmbedding(config); err != nil {
				return err
			}
			listener, err := net.Listen("tcp", listen)
			if err != nil {
				return err
			}
			ctx, stop := signal.NotifyContext(cmd.Context(), os.Interrupt, syscall.SIGTERM)
			defer stop()
			go func() {
				<-ctx.Done()
				stop() // from now on a signal ends the process
			}()
			config.Logger = slog.New(slog.NewJSONHandler(cmd.ErrOrStderr(), nil))
			return withRecords(cmd.Context(), data, &config, func() error {
				fmt.Fprintf(cmd.OutOrStdout(), "listening on http://%s\n", listener.Addr())
				return api.New(config).Run(ctx, listener)
			})
		},
	}
	flags := cmd.Flags()
	flags.StringVar(&listen, "listen", "127.0.0.1:8610", "address and port")
	flags.DurationVar(&config.DrainDelay, "drain", 5*time.Second, "from \"not ready\" to the end of accepting; more than the balancer needs to notice")
	flags.DurationVar(&config.ShutdownTimeout, "shutdown-timeout", 15*time.Second, "for requests in flight at the end")
	flags.Int64Var(&config.BodyLimit, "body-limit", 1<<20, "largest body of a request, and line of a batch, in bytes")
	flags.DurationVar(&config.StreamIdleTimeout, "stream-idle-timeout", time.Minute, "for how long a batch may stand still")
	flags.Int64Var(&config.SweepLimit, "sweep-limit", 1_000_000, "most points of a sweep in one request")
	flags.StringVar(&data, "data", "", "directory of the records, made where it is missing (default none: no records are kept)")
	flags.StringSliceVar(&config.FrameAncestors, "frame-ancestors", nil, "origins whose pages may show records in a frame, such as https://wiki.example, or self, or * for all (default none)")
	flags.StringVar(&config.PublicURL, "public-url", "", "address under which people reach the service (default that of the request)")
	for _, name := range []string{"frame-ancestors", "public-url", "listen", "drain", "shutdown-timeout", "body-limit", "sweep-limit", "stream-idle-timeout"} {
		completeFlag(cmd, name, cobra.NoFileCompletions)
	}
	return cmd
}

// checkEmbedding checks what is said of embedding, before anything is started.
func checkEmbedding(config api.Config) error {
	if _, err := api.FrameAncestors(config.FrameAncestors); err != nil {
		return &usageError{fmt.Errorf("--frame-ancestors: %w", err)}
	}
	if _, err := api.PublicURL(config.PublicURL); err != nil {
		return &usageError{fmt.Errorf("--public-url: %w", err)}
	}
	return nil
}
