package cite

// Sources on beams, plates and other structures.
var ()

var structures = []*Source{}
