package api

import (
	"errors"
	"fmt"
	"net/http"
	"net/url"
	"regexp"
	"strings"
)

// nobody is the list of pages that may frame this service's, where there are none.
const nobody = "'none'"

// framer is an origin as the directive frame-ancestors takes it. Its scheme is
// wanted, since without one the directive means that of the page.
var framer = regexp.MustCompile(`^https?://(\*\.)?[A-Za-z0-9-]+(\.[A-Za-z0-9-]+)*(:([0-9]{1,5}|\*))?$`)

// FrameAncestors writes the list of those who may show pages of this service in
// a frame, as the Content-Security-Policy has it: origins such as
// https://wiki.example or https://*.example:8443, self for this service, * for
// everybody. An empty list, and none by itself, is nobody.
func FrameAncestors(list []string) (string, error) {
	var sources []string
	for _, one := range list {
		one = strings.TrimSpace(one)
		switch word := strings.Trim(one, "'"); {
		case word == "none" && len(list) == 1:
			return nobody, nil
		case word == "none":
			return "", errors.New("none stands by itself")
		case word == "self":
			sources = append(sources, "'self'")
		case one == "*" || framer.MatchString(one):
			sources = append(sources, one)
		default:
			return "", fmt.Errorf("%q is no origin such as https://wiki.example; self and * are possible too", clip(one, 200))
		}
	}
	if len(sources) == 0 {
		return nobody, nil
	}
	return strings.Join(sources, " "), nil
}

// PublicURL checks the address under which people reach a service, and returns
// it without a slash at its end.
func PublicURL(text string) (string, error) {
	if text == "" {
		return "", nil
	}
	u, err := url.Parse(text)
	if err != nil {
		return "", fmt.Errorf("%q is no address such as https://regimed.example", clip(text, 200))
	}
	if u.Scheme != "http" && u.Scheme != "https" || !saneHost(u.Host) || u.User != nil || u.RawQuery != "" || u.ForceQuery || u.Fragment != "" || !u.IsAbs() {
		return "", fmt.Errorf("%q is no address such as https://regimed.example, with a path where there is one", clip(text, 200))
	}
	return strings.TrimRight(u.Scheme+"://"+u.Host+u.EscapedPath(), "/"), nil
}

// host is a name or an address with its port. What a caller sends as the header
// Host goes into links only if it looks so.
var host = regexp.MustCompile(`^([A-Za-z0-9_-]+(\.[A-Za-z0-9_-]+)*\.?|\[[0-9A-Fa-f:.]+\])(:[0-9]{1,5})?$`)

func saneHost(s string) bool { return len(s) <= 255 && host.MatchString(s) }

// baseURL is the address of this service for links that leave it: the public one,
// or the one that the request came to. Empty: it is not known.
//
// The second is what the caller says, in the header Host, so that it is told to
// no one else: an answer that holds it is for him alone, or has the header Vary.
// What a proxy says of the scheme is not read, as anybody can say it; behind a
// proxy that speaks https the operator sets the public address.
func (s *Server) baseURL(r *http.Request) string {
	switch {
	case s.publicURL != "":
		return s.publicURL
	case !saneHost(r.Host):
		return ""
	case r.TLS != nil:
		return "https://" + r.Host
	}
	return "http://" + r.Host
}

// configureEmbedding takes over what the operator says of embedding. What can't
// be read is left out, and the log says so: it must not open a door.
func (s *Server) configureEmbedding() {
	var err error
	if s.ancestors, err = FrameAncestors(s.config.FrameAncestors); err != nil {
		s.config.Logger.Error("frame ancestors", "cause", err.Error())
		s.ancestors = nobody
	}
	if s.publicURL, err = PublicURL(s.config.PublicURL); err != nil {
		s.config.Logger.Error("public address", "cause", err.Error())
	}
}
