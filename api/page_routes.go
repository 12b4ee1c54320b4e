package api

import (
	"net/http"
	"strings"

	"github.com/labstack/echo/v4"

	"regimed/api/page"
)

// pageRoutes are the paths of the case sheet.
func (s *Server) pageRoutes() {
	s.get("/", s.sheet)
	s.get("/sheet/:file", s.sheetFile)
	s.get("/examples.json", func(c echo.Context) error { return sendFile(c, page.Examples()) })
}

// sheet answers the page, to those who can read one.
func (s *Server) sheet(c echo.Context) error {
	c.Response().Header().Set(echo.HeaderVary, echo.HeaderAccept)
	if !acceptsHTML(c.Request().Header.Values(echo.HeaderAccept)) {
		return problem(notAcceptable, "This path holds a page in HTML. What a program can ask for is listed at /openapi.yaml.")
	}
	return sendFile(c, page.Index())
}

func (s *Server) sheetFile(c echo.Context) error {
	f, ok := page.Files()[c.Param("file")]
	if !ok {
		return problem(notFound, "The page has no file of this name.")
	}
	return sendFile(c, f)
}

// sendFile answers a file of the page. A browser keeps it, but asks each time
// whether it still holds, so that a page never runs with the scripts of another
// version.
func sendFile(c echo.Context, f page.File) error {
	h := c.Response().Header()
	h.Set("Content-Security-Policy", page.Policy)
	h.Set("Referrer-Policy", "no-referrer")
	h.Set("Cross-Origin-Opener-Policy", "same-origin")
	h.Set("Cross-Origin-Resource-Policy", "same-origin")
	h.Set("Permissions-Policy", "camera=(), geolocation=(), microphone=(), payment=(), usb=()")
	h.Set("X-Frame-Options", "DENY")
	h.Set(echo.HeaderCacheControl, "no-cache")
	h.Set("ETag", f.Tag)
	if holds(c.Request().Header.Values("If-None-Match"), f.Tag) {
		return c.NoContent(http.StatusNotModified)
	}
	return send(c, http.StatusOK, f.MediaType, f.Body)
}

// holds reports whether one of the tags that a caller has is the one in force
// (RFC 9110, 13.1.2: compared weakly).
func holds(lines []string, tag string) bool {
	for _, line := range lines {
		for one := range strings.SplitSeq(line, ",") {
			one = strings.TrimPrefix(strings.TrimSpace(one), "W/")
			if one == tag || one == "*" {
				return true
			}
		}
	}
	return false
}

// acceptsHTML reports whether a caller takes HTML. Who says nothing takes
// anything, as does who can't be understood.
func acceptsHTML(lines []string) bool {
	ranges := acceptRanges(lines)
	return len(ranges) == 0 || weightOf("text/html", ranges) > 0
}
