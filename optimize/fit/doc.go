// Package fit finds the parameters of a model that meet measurements best in the sense of least squares, with
// bounds, from several starts, and says how well the data determine them.
package fit
