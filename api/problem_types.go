package api

import (
	"net/http"

	"regimed/regime/input"
)

// ProblemType is one kind of failure. The list is append-only: callers branch
// on its URI.
type ProblemType struct {
	ID     string
	Title  string
	Status int
	Doc    string // what it means and what to do
	Codes  bool   // its violations carry codes
}

// URI is the reference that a problem carries and that can be fetched.
func (t *ProblemType) URI() string { return "/problems/" + t.ID }

// The problem types.
var (
	malformedJSON = &ProblemType{ID: "malformed-json", Title: "The body is no JSON", Status: http.StatusBadRequest,
		Doc: "The body can't be read as one strict JSON document in UTF-8. The offset counts the bytes before the place where reading stopped, and the pointer names the innermost value that had begun."}
	badRequest = &ProblemType{ID: "bad-request", Title: "The request can't be read", Status: http.StatusBadRequest,
		Doc: "The query is not encoded as a URL wants it, or the body broke off before its announced length or is not encoded as announced."}
	notFound = &ProblemType{ID: "not-found", Title: "Nothing here", Status: http.StatusNotFound,
		Doc: "No resource has this path or name. The detail names the nearest one where there is one."}
	methodNotAllowed = &ProblemType{ID: "method-not-allowed", Title: "Wrong method", Status: http.StatusMethodNotAllowed,
		Doc: "The path exists and answers other methods: those in the header Allow."}
	notAcceptable = &ProblemType{ID: "not-acceptable", Title: "Not in this form", Status: http.StatusNotAcceptable,
		Doc: "The path has an answer, but in none of the media types that the header Accept asks for. The detail says which one it has."}
	requestTimeout = &ProblemType{ID: "request-timeout", Title: "The body took too long", Status: http.StatusRequestTimeout,
		Doc: "The body did not arrive within the time that the server waits. Send it again."}
	tooLarge = &ProblemType{ID: "payload-too-large", Title: "The body is too large", Status: http.StatusRequestEntityTooLarge,
		Doc: "The body is larger than the server reads. A case is a few kilobytes; the limit is the operator's to set."}
	unsupportedMedia = &ProblemType{ID: "unsupported-media-type", Title: "Wrong media type", Status: http.StatusUnsupportedMediaType,
		Doc: "A case is sent as application/json in UTF-8, not compressed; a batch as application/x-ndjson in UTF-8, as it is or in gzip. The headers Accept-Post and Accept-Encoding say so too."}
	invalidCase = &ProblemType{ID: "invalid-case", Title: "Invalid case", Status: http.StatusUnprocessableEntity, Codes: true,
		Doc: "The body is JSON, but no case that can be computed. Every violation that was found is listed: its JSON Pointer into the body, a code, a sentence that says what would be right, and the value as received."}
	invalidQuery = &ProblemType{ID: "invalid-query", Title: "Invalid query", Status: http.StatusUnprocessableEntity, Codes: true,
		Doc: "A query parameter is unknown, missing, given twice, no number, or out of its range. The pointer names the parameter, as if the query were an object."}
	internal = &ProblemType{ID: "internal", Title: "Fault of the server", Status: http.StatusInternalServerError,
		Doc: "The server failed on a request that may well be right. The request id, in the instance and the header X-Request-ID, finds the cause in its log."}
	unavailable = &ProblemType{ID: "unavailable", Title: "Not ready", Status: http.StatusServiceUnavailable,
		Doc: "The server takes no new work, because it is about to stop."}
	tooLong = &ProblemType{ID: "answer-took-too-long", Title: "The answer took too long", Status: http.StatusServiceUnavailable,
		Doc: "The answer was not computed within the time that the server has for it. Ask for less: fewer samples of an uncertain input, what_if=false, or only the fields that are needed."}
	tooManyPoints = &ProblemType{ID: "too-many-points", Title: "Too many points for one request", Status: http.StatusUnprocessableEntity,
		Doc: "The sweep is right, and has more points than the server computes in one request; the limit is the operator's to set. Ask for its parts one after the other, with shards and index, or run it on the command line: regimed sweep --plan takes the same request, and can be stopped and resumed."}
)

var problemTypes = []*ProblemType{malformedJSON, badRequest, notFound, methodNotAllowed, requestTimeout, tooLarge,
	unsupportedMedia, invalidCase, invalidQuery, internal, unavailable, tooManyPoints, notAcceptable,
	recordsOff, recordsUnavailable, recordsFull, recordsDamaged, invalidRecord, ambiguousRecord, outdatedCase, unknownEmbedFormat}

// codes are the codes of violations, with what they mean.
var codes = []codeRecord{
	{input.UnknownField, "no field or parameter has this name; the sentence offers the nearest ones"},
	{input.UnknownKind, "no structure kind has this name"},
	{input.UnknownChoice, "the value is none of the names that may stand here"},
	{input.MissingField, "a field or parameter that is needed is missing"},
	{input.WrongType, "the value has another JSON type than the field"},
	{input.UnknownUnit, "the unit is not known"},
	{"ambiguous-unit", "the unit has two readings, such as lb"},
	{input.WrongDimension, "the unit measures something else"},
	{input.WrongMeaning, "the unit has the right dimension and the wrong meaning, such as a gauge pressure for an absolute one"},
	{input.MissingUnit, "a bare number stands where a unit is needed"},
	{input.BadQuantity, "the text can't be read as what stands here: a number and a unit, a time, a cursor"},
	{"bad-range", "the lower end of a range lies above the upper one"},
	{"negative-uncertainty", "a standard deviation is negative"},
	{"below-absolute-zero", "a temperature lies below absolute zero"},
	{input.NotFinite, "the number is not finite, or beyond the range of a double"},
	{input.OutOfRange, "the value lies outside the range of the field, the property or the solution"},
	{input.Contradiction, "the value contradicts another one"},
	{input.Duplicate, "the name is given twice"},
	{input.TooMany, "there are more violations than are listed"},
}

type codeRecord struct {
	Code    input.Code `json:"code"`
	Meaning string     `json:"meaning"`
}

// problemRecord documents a problem type.
type problemRecord struct {
	Type        string       `json:"type"`
	Title       string       `json:"title"`
	Status      int          `json:"status"`
	Description string       `json:"description"`
	Codes       []codeRecord `json:"codes,omitempty"`
}

func (t *ProblemType) record() problemRecord {
	r := problemRecord{Type: t.URI(), Title: t.Title, Status: t.Status, Description: t.Doc}
	if t.Codes {
		r.Codes = codes
	}
	return r
}

// problemList is the answer of /problems.
type problemList struct {
	Problems []problemRecord `json:"problems"`
}

func problemIndex() problemList {
	var list problemList
	for _, t := range problemTypes {
		r := t.record()
		r.Codes = nil
		list.Problems = append(list.Problems, r)
	}
	return list
}
