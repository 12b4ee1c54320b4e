package api

import (
	"context"
	"encoding/xml"
	"fmt"
	"html"
	"net/http"
	"net/url"
	"slices"
	"strconv"
	"strings"

	"github.com/labstack/echo/v4"

	"regimed/api/store"
	"regimed/regime/input"
)

// unknownEmbedFormat is what oEmbed 1.0 wants 501 for.
var unknownEmbedFormat = &ProblemType{ID: "embed-format", Title: "Not in this format", Status: http.StatusNotImplemented,
	Doc: "oEmbed answers are made in json and in xml; the parameter format asked for another one."}

const typeXML = "text/xml; charset=utf-8"

// Sizes of what is embedded, in pixels.
const (
	frameWidth  = 640
	frameHeight = 400

	embedCacheAge = 24 * 60 * 60 // seconds; a record never changes, but it may be deleted
)

// oembedAnswer says how to show a record (oEmbed 1.0, type rich).
type oembedAnswer struct {
	XMLName         xml.Name `json:"-" xml:"oembed"`
	Version         string   `json:"version" xml:"version"`
	Type            string   `json:"type" xml:"type"`
	Title           string   `json:"title" xml:"title"`
	AuthorName      string   `json:"author_name,omitzero" xml:"author_name,omitempty"`
	ProviderName    string   `json:"provider_name" xml:"provider_name"`
	ProviderURL     string   `json:"provider_url" xml:"provider_url"`
	CacheAge        int      `json:"cache_age" xml:"cache_age"`
	HTML            string   `json:"html" xml:"html"`
	Width           int      `json:"width" xml:"width"`
	Height          int      `json:"height" xml:"height"`
	ThumbnailURL    string   `json:"thumbnail_url,omitzero" xml:"thumbnail_url,omitempty"`
	ThumbnailWidth  int      `json:"thumbnail_width,omitzero" xml:"thumbnail_width,omitempty"`
	ThumbnailHeight int      `json:"thumbnail_height,omitzero" xml:"thumbnail_height,omitempty"`
}

// oembedQuery is what a consumer asks.
type oembedQuery struct {
	target              *url.URL
	format              string
	maxWidth, maxHeight int
}

// oembed answers how a record is shown. It passes over parameters that it does
// not know: the standard lets consumers send more.
func (s *Server) oembed(c echo.Context) error {
	q, err := readOembed(c.Request().URL.RawQuery)
	if err != nil {
		return err
	}
	records, err := s.records()
	if err != nil {
		return err
	}
	base := s.baseFor(c.Request(), q.target)
	id, look, err := recordAt(base, q.target)
	if err != nil {
		return err
	}
	r, err := s.findRecord(c, records, id)
	if err != nil {
		return err
	}
	ctx, cancel := s.computing(c)
	defer cancel()
	answer, err := s.oembedOf(ctx, r, base, look, q)
	if err != nil {
		return err
	}
	body, mediaType, err := q.written(answer)
	if err != nil {
		return err
	}
	h := c.Response().Header()
	h.Set(echo.HeaderCacheControl, "private, max-age="+strconv.Itoa(embedCacheAge)) // it holds the header Host of who asked
	h.Set(echo.HeaderVary, "Host")
	return send(c, http.StatusOK, mediaType, body)
}

// readOembed reads the parameters and collects what is wrong with them. The
// format comes first, as it has a status of its own.
func readOembed(query string) (*oembedQuery, error) {
	values, err := url.ParseQuery(query)
	if err != nil {
		return nil, problem(badRequest, "The query is not encoded as a URL wants it.")
	}
	q := &oembedQuery{format: "json"}
	if values.Has("format") {
		q.format = values.Get("format")
	}
	if q.format != "json" && q.format != "xml" {
		return nil, problem(unknownEmbedFormat, fmt.Sprintf("There is no format %s; there are json and xml.", quoted(q.format)))
	}
	var bad input.Violations
	for _, name := range []string{"url", "format", "maxwidth", "maxheight"} {
		if n := len(values[name]); n > 1 {
			bad.Add("/"+name, input.Duplicate, fmt.Sprintf("%s is given %d times.", name, n), jsonString(clip(values[name][1], 200)))
		}
	}
	q.maxWidth = pixelsOf(values, "maxwidth", &bad)
	q.maxHeight = pixelsOf(values, "maxheight", &bad)
	q.target, err = url.Parse(values.Get("url"))
	switch {
	case !values.Has("url"):
		bad.Add("/url", input.MissingField, "url is needed: the address of a record of this service.", nil)
	case err != nil || q.target.Host == "" || q.target.Scheme != "http" && q.target.Scheme != "https":
		bad.Add("/url", input.BadQuantity, "url is no address that begins with http:// or https://.", jsonString(clip(values.Get("url"), 200)))
	}
	if bad.Any() {
		return nil, violated(invalidQuery, "The query", bad.List())
	}
	return q, nil
}

// pixelsOf reads a length in pixels; 0 where there is none.
func pixelsOf(values url.Values, name string, bad *input.Violations) int {
	if !values.Has(name) {
		return 0
	}
	text := values.Get(name)
	n, err := strconv.Atoi(text)
	if err != nil || n < 1 {
		bad.Add("/"+name, input.OutOfRange, name+" is a whole number of pixels, at least 1.", jsonString(clip(text, 200)))
		return 0
	}
	return n
}

// baseFor is the address of this service as the asked address has it: without a
// public one, its host must be that of the request, and its scheme is taken over,
// as a proxy may speak another one than this server.
func (s *Server) baseFor(r *http.Request, target *url.URL) string {
	if s.publicURL != "" {
		return s.publicURL
	}
	if !saneHost(r.Host) {
		return ""
	}
	return target.Scheme + "://" + r.Host
}

// recordAt finds the id of a record in an address of this service.
func recordAt(base string, target *url.URL) (id string, look embedLook, err error) {
	nothing := problem(notFound, "This address is none of a record of this service.")
	at, err := url.Parse(base)
	if err != nil || base == "" || target.Scheme != at.Scheme || !strings.EqualFold(target.Host, at.Host) {
		return "", look, nothing
	}
	path, found := strings.CutPrefix(target.Path, at.Path)
	if !found {
		return "", look, nothing
	}
	if name, ok := strings.CutPrefix(path, recordsPath+"/"); ok {
		id, _, err = recordName(name)
		return id, look.usual(), err
	}
	name, ok := strings.CutPrefix(path, embedPath+"/")
	if !ok {
		return "", look, nothing
	}
	id, _, err = embedName(name)
	return id, lookIn(target.Query()), err
}

// lookIn takes over how an address wants its record shown, as far as it can be read.
func lookIn(values url.Values) embedLook {
	var look embedLook
	if theme := values.Get("theme"); slices.Contains(embedThemes, theme) {
		look.Theme = theme
	}
	if view := values.Get("view"); slices.Contains(embedViews, view) {
		look.View = view
	}
	return look.usual()
}

// oembedOf says how a record is shown: in a frame where pages may frame this
// service, otherwise as a picture that leads to the record, since the frame
// would stay empty.
func (s *Server) oembedOf(ctx context.Context, r *store.Record, base string, look embedLook, q *oembedQuery) (*oembedAnswer, error) {
	e, err := embeddedOf(r, look, base)
	if err != nil {
		return nil, err
	}
	picture := base + embedPath + "/" + r.ID + ".svg"
	a := &oembedAnswer{Version: "1.0", Type: "rich", Title: e.Title(), AuthorName: r.Author,
		ProviderName: "regimed", ProviderURL: base + "/", CacheAge: embedCacheAge}
	width, height := stripSize(ctx, r)
	if width > 0 && fits(width, q.maxWidth) && fits(height, q.maxHeight) {
		a.ThumbnailURL, a.ThumbnailWidth, a.ThumbnailHeight = picture, width, height
	}
	if s.ancestors == nobody && width > 0 {
		a.Width, a.Height = scaledTo(width, height, q.maxWidth, q.maxHeight)
		a.HTML = fmt.Sprintf(`<a href="%s"><img src="%s" alt="%s" width="%d" height="%d"></a>`,
			html.EscapeString(e.Link), html.EscapeString(picture), html.EscapeString(e.Title()), a.Width, a.Height)
		return a, nil
	}
	a.Width, a.Height = atMost(frameWidth, q.maxWidth), atMost(frameHeight, q.maxHeight)
	if s.ancestors == nobody {
		a.HTML = fmt.Sprintf(`<a href="%s">%s</a>`, html.EscapeString(e.Link), html.EscapeString(e.Title()))
		return a, nil
	}
	address := base + embedPath + "/" + r.ID + look.query()
	a.HTML = fmt.Sprintf(`<iframe src="%s" title="%s" width="%d" height="%d" style="border:0" loading="lazy" sandbox="allow-popups allow-popups-to-escape-sandbox" referrerpolicy="no-referrer"></iframe>`,
		html.EscapeString(address), html.EscapeString(e.Title()), a.Width, a.Height)
	return a, nil
}

// stripSize is the size of the strip of a record, which is higher where it has a
// note to carry; 0 where the engine in force draws none.
func stripSize(ctx context.Context, r *store.Record) (width, height int) {
	form, _ := formatNamed(stripForm)
	if form == nil {
		return 0, 0
	}
	v, err := drawnView(ctx, r, form, false)
	if err != nil {
		return 0, 0
	}
	root, _, err := rootOfSVG(v.body)
	if err != nil {
		return 0, 0
	}
	w, h := sizeOfSVG(root.Attr)
	return int(w), int(h)
}

// query is the look as parameters; what is usual is left out.
func (l embedLook) query() string {
	q := url.Values{}
	if l.Theme != embedThemes[0] {
		q.Set("theme", l.Theme)
	}
	if l.View != embedViews[0] {
		q.Set("view", l.View)
	}
	if len(q) == 0 {
		return ""
	}
	return "?" + q.Encode()
}

// fits reports whether a length is within a bound; 0 is none.
func fits(n, most int) bool { return most == 0 || n <= most }

func atMost(n, most int) int {
	if fits(n, most) {
		return n
	}
	return most
}

// scaledTo shrinks a picture into bounds, in proportion.
func scaledTo(width, height, mostWidth, mostHeight int) (int, int) {
	w, h := atMost(width, mostWidth), atMost(height, mostHeight)
	if w*height > h*width {
		return max(h*width/height, 1), h
	}
	return w, max(w*height/width, 1)
}

// written writes an answer in the format that was asked for.
func (q *oembedQuery) written(a *oembedAnswer) (body []byte, mediaType string, err error) {
	if q.format == "json" {
		body, err = encode(a)
		return body, typeJSON, err
	}
	body, err = xml.Marshal(a)
	return append([]byte(`<?xml version="1.0" encoding="utf-8" standalone="yes"?>`+"\n"), append(body, '\n')...), typeXML, err
}

// discovery tells who reads a record where its oEmbed answer is: in a header,
// and in the head of a page.
func (s *Server) discovery(c echo.Context, r *store.Record, v *view) {
	base := s.baseURL(c.Request())
	if base == "" {
		return
	}
	address := base + "/oembed?url=" + url.QueryEscape(base+recordPath(r.ID)) + "&format="
	h := c.Response().Header()
	if s.publicURL == "" {
		h.Add(echo.HeaderVary, "Host")
	}
	for _, format := range []string{"json", "xml"} {
		h.Add("Link", fmt.Sprintf(`<%s%s>; rel="alternate"; type="%s"`, address, format, discoveryType(format)))
	}
	if v.mediaType == typeHTML {
		v.body = withDiscovery(v.body, address)
	}
}

// discoveryType is what oEmbed calls its formats in links.
func discoveryType(format string) string {
	if format == "xml" {
		return "text/xml+oembed"
	}
	return "application/json+oembed"
}

// withDiscovery puts the links into the head of a page.
func withDiscovery(page []byte, address string) []byte {
	before, after, found := strings.Cut(string(page), "</head>")
	if !found {
		return page
	}
	links := ""
	for _, format := range []string{"json", "xml"} {
		links += fmt.Sprintf("<link rel=\"alternate\" type=\"%s\" href=\"%s\">\n", discoveryType(format), html.EscapeString(address+format))
	}
	return []byte(before + links + "</head>" + after)
}
