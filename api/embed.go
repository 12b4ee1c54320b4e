package api

import (
	"crypto/sha256"
	"encoding/base64"
	"net/http"
	"strings"

	"github.com/labstack/echo/v4"

	"regimed/api/store"
)

const (
	embedPath = "/embed"

	typeHTML = "text/html; charset=utf-8"
	typeSVG  = "image/svg+xml"

	headerResourcePolicy = "Cross-Origin-Resource-Policy"
	anyOrigin            = "cross-origin" // a page of another origin may show it
)

// embedRoutes are the paths for pages of others that show a record.
func (s *Server) embedRoutes() {
	s.get(embedPath+"/:id", s.embed)
	s.get("/oembed", s.oembed)
}

// embedLook is how an embedding is wanted.
type embedLook struct{ Theme, View string }

// The choices of an embedding, the usual one first.
var (
	embedThemes = []string{"auto", "light", "dark"}
	embedViews  = []string{"summary", "findings"}
)

// embedPolicy lets the page load nothing and run nothing; its one style is named
// by its digest.
func (s *Server) embedPolicy() string {
	return "default-src 'none'; style-src '" + embedStyleDigest + "'; base-uri 'none'; form-action 'none'; frame-ancestors " + s.ancestors
}

// embedStyleDigest names the style as a Content-Security-Policy does.
var embedStyleDigest = func() string {
	sum := sha256.Sum256([]byte(embedStyle))
	return "sha256-" + base64.StdEncoding.EncodeToString(sum[:])
}()

// embed answers a record as a page for a frame, or as a picture with .svg.
func (s *Server) embed(c echo.Context) error {
	records, err := s.records()
	if err != nil {
		return err
	}
	id, isPicture, err := embedName(c.Param("id"))
	if err != nil {
		return err
	}
	look, err := embedQuery(c, isPicture)
	if err != nil {
		return err
	}
	r, err := s.findRecord(c, records, id)
	if err != nil {
		return err
	}
	if isPicture {
		return s.sendStrip(c, r)
	}
	e, err := embeddedOf(r, look, s.publicURL)
	if err != nil {
		return err
	}
	body, err := e.page()
	if err != nil {
		return err
	}
	return s.sendEmbedded(c, r, typeHTML, s.embedPolicy(), body)
}

// stripForm is the form of an answer that is embedded as a picture.
const stripForm = "strip"

func (s *Server) sendStrip(c echo.Context, r *store.Record) error {
	form, hint := formatNamed(stripForm)
	if form == nil {
		return problem(notFound, hint)
	}
	ctx, cancel := s.computing(c)
	defer cancel()
	v, err := drawnView(ctx, r, form, false)
	if err != nil {
		return s.storeProblem(c, err)
	}
	c.Response().Header().Set(headerDrawnBy, v.drawnBy)
	return s.sendEmbedded(c, r, v.mediaType, recordPolicy, v.body)
}

// embedName takes the last part of a path apart.
func embedName(name string) (id string, isPicture bool, err error) {
	id, suffix, dotted := strings.Cut(name, ".")
	if dotted && suffix != "svg" {
		return "", false, problem(notFound, "A record is embedded as a page, or as a picture with .svg behind its id.")
	}
	id, _, err = recordName(id)
	return id, dotted, err
}

// embedQuery reads how an embedding is wanted.
func embedQuery(c echo.Context, isPicture bool) (embedLook, error) {
	known := []string{"theme", "view"}
	if isPicture {
		known = nil
	}
	values, violations, err := parameters(c, known...)
	if err != nil {
		return embedLook{}, err
	}
	r := &queryReader{values: values}
	look := embedLook{Theme: r.name("theme", embedThemes), View: r.name("view", embedViews)}
	if violations = append(violations, r.bad.List()...); len(violations) > 0 {
		return embedLook{}, violated(invalidQuery, "The query", violations)
	}
	return look.usual(), nil
}

// usual fills in what was not asked for.
func (l embedLook) usual() embedLook {
	if l.Theme == "" {
		l.Theme = embedThemes[0]
	}
	if l.View == "" {
		l.View = embedViews[0]
	}
	return l
}

// sendEmbedded sends an embedding. It is asked for anew each time, since who may
// frame it stands in its headers.
func (s *Server) sendEmbedded(c echo.Context, r *store.Record, mediaType, policy string, body []byte) error {
	tag := tagOf(body)
	h := c.Response().Header()
	h.Set(echo.HeaderContentSecurityPolicy, policy)
	h.Set("Referrer-Policy", "no-referrer")
	h.Set(headerETag, tag)
	h.Set(headerEngine, engineText(r.Engine))
	h.Set("Cross-Origin-Embedder-Policy", "require-corp") // pages that want it of themselves want it of their frames
	h.Set(echo.HeaderCacheControl, cacheAsking)
	if mediaType == typeSVG || s.ancestors != nobody {
		h.Set(headerResourcePolicy, anyOrigin)
	} else {
		h.Set(echo.HeaderXFrameOptions, "DENY")
	}
	if holds(c.Request().Header.Values("If-None-Match"), tag) {
		return c.NoContent(http.StatusNotModified)
	}
	return send(c, http.StatusOK, mediaType, body)
}

// guard says what pages of other origins may do with what is drawn of a record:
// frame it as they may an embedding, and show its pictures.
func (s *Server) guard(c echo.Context, v *view) {
	h := c.Response().Header()
	h.Set(echo.HeaderContentSecurityPolicy, recordPolicy+"; frame-ancestors "+s.ancestors)
	if strings.HasPrefix(v.mediaType, "image/") {
		h.Set(headerResourcePolicy, anyOrigin)
	}
}

// embedded is what an embedding shows. All of it is what the record has: nothing
// is judged anew, so that a page that was reviewed keeps saying the same.
type embedded struct {
	Head   *store.Head
	Look   embedLook
	Link   string // to the record
	Answer embeddedAnswer
	Shown  []embeddedFinding // the most loaded first
	Left   int               // findings with a price that are not shown
}

// embeddedAnswer is what of an answer is read for it.
type embeddedAnswer struct {
	Title          string `json:"title"`
	Reference      string `json:"reference"`
	Recommendation struct {
		Class       string   `json:"class"`
		Title       string   `json:"title"`
		Solves      string   `json:"solves"`
		Provisional bool     `json:"provisional"`
		Conditions  []string `json:"conditions"`
	} `json:"recommendation"`
	Findings map[string]embeddedFinding `json:"findings"`
	Cautions []string                   `json:"cautions"`
}

// embeddedFinding is a finding that has a price, or waits for an input.
type embeddedFinding struct {
	ID          string   `json:"-"`
	Title       string   `json:"title"`
	Verdict     string   `json:"verdict"`
	OfInterest  bool     `json:"of_interest"`
	Utilisation *float64 `json:"utilisation"`
	Factor      *float64 `json:"factor"`
	Needs       []string `json:"needs"`
}
