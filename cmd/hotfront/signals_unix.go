//go:build unix

package main

import (
	"os"
	"syscall"
)

// stopSignals are those that ask a search to stop with a checkpoint.
func stopSignals() []os.Signal { return []os.Signal{os.Interrupt, syscall.SIGTERM, syscall.SIGUSR1} }
