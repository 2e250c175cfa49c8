package main

import "errors"

// Exit codes, as `hotfront --help` lists them.
const (
	exitDone        = 0
	exitFailure     = 1   // something went wrong
	exitUsage       = 2   // wrong command, flag or argument
	exitStudy       = 3   // the study is not valid
	exitInfeasible  = 4   // no design meets all limits
	exitStopped     = 75  // stopped with a checkpoint; run it again to go on
	exitInterrupted = 130 // interrupted with nothing to go on from, or by a second signal
)

const exitHelp = `Exit codes:
    0  done
    1  failure
    2  wrong command, flag or argument
    3  the study is not valid
    4  no design meets all limits
   75  stopped with a checkpoint; the same command goes on
  130  interrupted: by a second signal, or where there is nothing to go on from`

// exitError carries an exit code; with an empty text everything has been said already.
type exitError struct {
	code int
	text string
}

func (e *exitError) Error() string { return e.text }

func failed(code int, text string) error { return &exitError{code, text} }

// exitCode is that of an error a command returned.
func exitCode(err error) int {
	if err == nil {
		return exitDone
	}
	if e, ok := errors.AsType[*exitError](err); ok {
		return e.code
	}
	return exitFailure
}
