//go:build !unix

package main

import "os"

// stopSignals are those that ask a search to stop with a checkpoint.
func stopSignals() []os.Signal { return []os.Signal{os.Interrupt} }
