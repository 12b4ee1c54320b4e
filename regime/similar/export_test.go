package similar

import "regimed/regime/input"

// HasQuantity reports whether a place has a scale factor of its own.
func HasQuantity(p input.Place) bool { return quantityOf(p) >= 0 }
