package api

import (
	"net/http"
	"strings"

	"github.com/labstack/echo/v4"

	"regimed/api/swagger"
)

// docsRoutes are the paths of the page that shows the HTTP interface.
func (s *Server) docsRoutes() {
	files := map[string]swagger.File{}
	for _, f := range swagger.Files() {
		files[strings.TrimPrefix(f.Path, docsPath)] = f
	}
	s.get(docsPath, func(c echo.Context) error { return sendDocs(c, files[""]) })
	s.get(docsPath+"/:file", func(c echo.Context) error {
		f, ok := files["/"+c.Param("file")]
		if !ok {
			return problem(notFound, "The page has no file of this name.")
		}
		return sendDocs(c, f)
	})
}

const docsPath = "/docs"

// sendDocs answers a file of the page. A browser keeps it, and asks each time
// whether it still holds.
func sendDocs(c echo.Context, f swagger.File) error {
	h := c.Response().Header()
	h.Set(echo.HeaderContentSecurityPolicy, swagger.Policy)
	h.Set("Referrer-Policy", "no-referrer")
	h.Set(headerResourcePolicy, "same-origin")
	h.Set(echo.HeaderXFrameOptions, "DENY")
	h.Set(echo.HeaderCacheControl, cacheAsking)
	h.Set(headerETag, f.ETag)
	if holds(c.Request().Header.Values("If-None-Match"), f.ETag) {
		return c.NoContent(http.StatusNotModified)
	}
	return send(c, http.StatusOK, f.MediaType, f.Body)
}
