// Package api serves the classification over HTTP.
//
// It translates and decides nothing: a body becomes a case, an answer becomes
// JSON, and everything that goes wrong becomes problem details (RFC 9457) with
// one media type, application/problem+json. The contract is
// openapi/openapi.yaml; tests hold the two against each other both ways.
//
//	POST /v1/classify            a case in, the answer out
//	POST /v1/batch               cases in, a line each, answers out, a line each
//	POST /v1/sweeps              a case and axes in, a row a point out
//	POST /v1/map                 a case and two axes in, the map of classes out
//	POST /v1/compare             two cases in, what differs out
//	POST /v1/scale               a case and scales in, the model's case and what is distorted out
//	GET  /v1/catalog             what the engine knows, by catalogue
//	GET  /v1/catalog/{name}      one catalogue
//	GET  /v1/canon/{name}        one canonical solution, arguments in the query
//	GET  /v1/schema/case         JSON Schema of a case
//	POST /v1/records             keeps an answer; GET lists what is kept
//	GET  /v1/records/{id}        a record, or its answer in a form; DELETE removes it
//	GET  /embed/{id} /oembed     a record for a page of others, in a frame or as a picture
//	GET  /                       the case sheet, a page on which to build a case
//	GET  /docs                   these operations, to look through and try
//	GET  /problems/{id}          what a problem type means
//	GET  /healthz /readyz /version /openapi.yaml /openapi.json
//
// Where there is a GET there is a HEAD.
package api
