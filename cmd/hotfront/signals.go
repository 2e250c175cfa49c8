package main

import (
	"context"
	"fmt"
	"io"
	"os"
	"os/signal"
)

// withSignals gives a context that ends at the first signal; the second ends the program.
func withSignals(parent context.Context, errw io.Writer) (context.Context, func()) {
	ctx, cancel := context.WithCancel(parent)
	signals := make(chan os.Signal, 2)
	signal.Notify(signals, stopSignals()...)
	done := make(chan struct{})
	go func() {
		select {
		case <-signals:
			fmt.Fprintln(errw, "\nhotfront: stopping after the designs under way; a second signal stops at once")
			cancel()
		case <-done:
			return
		}
		select {
		case <-signals:
			os.Exit(exitInterrupted)
		case <-done:
		}
	}()
	return ctx, func() {
		signal.Stop(signals)
		close(done)
		cancel()
	}
}
