package api

import "regimed/api/render"

// Version says which engine answers, and by which rules it judges.
type Version struct {
	Engine    string `json:"engine"`
	Catalogue string `json:"catalogue"` // digest of the assumptions, classes and presets in force
}

func version() Version { return Version{Engine: render.Version, Catalogue: render.Catalogue()} }
