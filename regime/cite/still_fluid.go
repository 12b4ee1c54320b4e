package cite

// Sources on oscillation and sound in still fluid, films, tubes.
var ()

var stillFluid = []*Source{}
