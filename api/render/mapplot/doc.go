// Package mapplot draws a map of recommended classes over two inputs: regions in
// the colour of their class, the lines on which an assumption reaches its limit,
// and the case itself. SVG or PNG.
package mapplot
