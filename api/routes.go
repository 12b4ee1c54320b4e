package api

import (
	"net/http"
	"strings"

	"github.com/labstack/echo/v4"
)

// routes is the whole table. A path stands here and in openapi/openapi.yaml,
// and nowhere else.
func (s *Server) routes() {
	s.echo.POST("/v1/classify", s.classify)
	s.echo.POST("/v1/sweeps", s.sweep)
	s.echo.POST("/v1/batch", s.batch)
	s.echo.POST("/v1/compare", s.compare)
	s.echo.POST("/v1/scale", s.scale)
	s.echo.POST("/v1/map", s.regimeMap)
	s.get("/v1/catalog", plainQuery(s.fixed.index))
	for _, name := range CatalogNames() {
		s.get("/v1/catalog/"+name, plainQuery(s.fixed.catalogs[name]))
	}
	s.get("/v1/canon/:name", s.canon)
	s.recordRoutes()
	s.get("/v1/schema/case", plainQuery(s.fixed.schema))
	s.get("/problems", s.fixed.problemIndex.answer)
	s.get("/problems/:id", s.problem)
	s.pageRoutes()
	s.embedRoutes()
	s.docsRoutes()
	s.get("/healthz", s.fixed.health.answer)
	s.get("/readyz", s.ready)
	s.get("/version", s.fixed.version.answer)
	s.get("/openapi.yaml", s.fixed.specYAML.answer)
	s.get("/openapi.json", s.fixed.specJSON.answer)
}

func (s *Server) get(path string, h echo.HandlerFunc) {
	s.echo.GET(path, h)
	s.echo.HEAD(path, h)
}

// ready says whether new work is welcome.
func (s *Server) ready(c echo.Context) error {
	if s.draining.Load() {
		return problem(unavailable, "The server is about to stop; ask another one.")
	}
	return s.fixed.ready.answer(c)
}

// paths lists the paths that a caller may mean, for suggestions: those that can
// be asked for as they stand.
func (s *Server) paths() []string {
	var list []string
	for _, r := range s.echo.Routes() {
		if r.Method != http.MethodHead && !strings.Contains(r.Path, ":") {
			list = append(list, r.Path)
		}
	}
	return list
}
