// Package calibration fits the corrections of the model to measurements of an engine.
package calibration
