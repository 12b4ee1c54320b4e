package mapplot

import (
	"image/color"

	"regimed/regime/whatif"
)

var (
	ink   = color.RGBA{0x22, 0x22, 0x22, 0xff}
	grey  = color.RGBA{0x55, 0x55, 0x55, 0xff}
	pale  = color.RGBA{0xb4, 0xb4, 0xb4, 0xff}
	white = color.RGBA{0xff, 0xff, 0xff, 0xff}
)

// colours are those of the classes, by id: the same in every map. The dearer a
// class, the darker; families share a hue: grey for the structure alone, blue for
// fluid at rest, green for a free surface, violet for flow in one dimension, yellow
// to brown for loads of a flow, orange to red for what excites itself, rose for
// two-way coupling. A test holds them apart, also for eyes that do not tell red
// from green.
var colours = map[string]color.RGBA{
	"dry-structure":           {0xf4, 0xf3, 0xf0, 0xff},
	"added-mass":              {0xc4, 0xe2, 0xef, 0xff},
	"viscous-added-mass":      {0x72, 0xbf, 0xe5, 0xff},
	"thin-film":               {0xaa, 0xc4, 0xde, 0xff},
	"steady-load":             {0xf9, 0xed, 0x9e, 0xff},
	"morison":                 {0xb6, 0xe0, 0xd2, 0xff},
	"conveying-beam":          {0xc2, 0xc6, 0xff, 0xff},
	"pressure-surge-1d":       {0xb2, 0x9e, 0xc1, 0xff},
	"pulse-wave-1d":           {0xdf, 0xd6, 0xff, 0xff},
	"dry-nonlinear-structure": {0xd7, 0xc3, 0xb2, 0xff},
	"quasi-static-array":      {0xca, 0xb7, 0x5c, 0xff},
	"sloshing":                {0xb7, 0xf6, 0xd4, 0xff},
	"diffraction-radiation":   {0x80, 0xcf, 0xcb, 0xff},
	"static-aeroelastic":      {0xf8, 0xd9, 0xa5, 0xff},
	"quasi-steady":            {0xfd, 0xcc, 0x7d, 0xff},
	"acoustic-structure":      {0x7f, 0xb9, 0xff, 0xff},
	"hydroelastic-sloshing":   {0x4f, 0xb6, 0xa5, 0xff},
	"wake-model":              {0xfe, 0xb1, 0x82, 0xff},
	"linear-unsteady":         {0xf1, 0xbb, 0x9d, 0xff},
	"flutter-derivatives":     {0xe0, 0x92, 0x7c, 0xff},
	"thermoviscous-acoustic":  {0x93, 0x95, 0xd9, 0xff},
	"unsteady-load":           {0xc7, 0x9f, 0x61, 0xff},
	"two-way-explicit":        {0xdd, 0xa8, 0xb8, 0xff},
	"two-way-implicit":        {0xc6, 0x8c, 0x8a, 0xff},
}

// colourOf is the colour of a zone; white, under hatching, where nothing can be
// computed, and grey for a class that has none yet.
func colourOf(z *whatif.Zone) color.RGBA {
	if z.Class == nil {
		return white
	}
	if c, ok := colours[z.Class.ID]; ok {
		return c
	}
	return pale
}
