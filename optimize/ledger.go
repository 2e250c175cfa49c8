package optimize

import "fmt"

// Ledger is the durable memory of a run: points by sequence number 0, 1, 2, ... in the order in which the
// driver asked for them. Its methods are called from one goroutine at a time, Record from another one than Recall.
type Ledger interface {
	// Recall fills dst[0:n] with the stored points first, first+1, ..., X included, and returns n. It
	// returns fewer than len(dst) only where the stored points end. The points of dst come with room
	// for the problem's numbers; Recall may fill it or put slices of its own in place. Extra is nil where
	// Record was given none.
	Recall(first int, dst []Point) (n int, err error)
	// Record stores points under the numbers first, first+1, ... When it returns nil they are durable.
	// It must not keep their slices. Extra is nil for points whose further results need not be stored. How
	// many points come at a time depends on how fast they are recorded.
	Record(first int, points []Point) error
}

// Error is an error without data of its own, to be compared with errors.Is.
type Error string

func (e Error) Error() string { return string(e) }

const (
	// ErrLedgerMismatch: the ledger holds the points of another problem, seed, population or driver.
	ErrLedgerMismatch = Error("optimize: ledger holds another run")
	// ErrProblem: the problem or the settings contradict themselves.
	ErrProblem = Error("optimize: problem not valid")
)

// MismatchError says at which number the ledger and the run part. It unwraps to ErrLedgerMismatch.
type MismatchError struct {
	Seq      int    // sequence number of the point
	Variable string // name of the first variable that differs; empty if the lengths differ
	Stored   float64
	Asked    float64
}

func (e *MismatchError) Error() string {
	if e.Variable == "" {
		return fmt.Sprintf("%v: design %d has other numbers of variables, aims, limits or extras", ErrLedgerMismatch, e.Seq)
	}
	return fmt.Sprintf("%v: design %d is stored with %s = %v, the run asks for %v",
		ErrLedgerMismatch, e.Seq, e.Variable, e.Stored, e.Asked)
}

// Unwrap makes errors.Is(err, ErrLedgerMismatch) hold.
func (e *MismatchError) Unwrap() error { return ErrLedgerMismatch }
