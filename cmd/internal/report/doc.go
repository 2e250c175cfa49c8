// Package report prints results: one printer a file, each on an io.Writer. It converts from SI to the
// units of a table and works out nothing.
package report
