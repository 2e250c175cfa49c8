package archive

import (
	"database/sql"
	"errors"
	"fmt"

	"hotfront/optimize"
)

var _ optimize.Ledger = (*Archive)(nil)

// Len is the number of designs stored.
func (a *Archive) Len() (int, error) {
	var last sql.NullInt64
	if err := a.db.QueryRow("SELECT max(seq) FROM designs").Scan(&last); err != nil {
		return 0, explain("read", a.file, err)
	}
	if !last.Valid {
		return 0, nil
	}
	return int(last.Int64) + 1, nil
}

// Record stores points under the numbers first, first+1, ... in one transaction. The numbers must follow
// on those that are stored.
func (a *Archive) Record(first int, points []optimize.Point) error {
	if len(points) == 0 {
		return nil
	}
	tx, err := a.db.Begin()
	if err != nil {
		return explain("begin in", a.file, err)
	}
	if err := a.insert(tx, first, points); err != nil {
		// SQLite itself rolls back when the disk is full; that there is nothing left to roll back is no news.
		_ = tx.Rollback()
		return explain("write to", a.file, err)
	}
	return explain("commit to", a.file, tx.Commit())
}

func (a *Archive) insert(tx *sql.Tx, first int, points []optimize.Point) error {
	var next int
	if err := tx.QueryRow("SELECT coalesce(max(seq) + 1, 0) FROM designs").Scan(&next); err != nil {
		return err
	}
	if first != next {
		return fmt.Errorf("design %d does not follow on the %d designs stored", first, next)
	}
	statement, err := tx.Prepare("INSERT INTO designs (seq, x, f, g, extra, cause, sum) VALUES (?, ?, ?, ?, ?, ?, ?)")
	if err != nil {
		return err
	}
	defer statement.Close()
	var room []byte
	for i := range points {
		p := &points[i]
		if len(p.X) != len(a.meta.Variables) || len(p.F) != a.meta.Aims || len(p.G) != a.meta.Limits || len(p.Extra) != len(a.meta.Extras) {
			panic("archive: a point of another problem")
		}
		room = room[:0]
		cut := func(numbers []float64) []byte {
			begin := len(room)
			room = appendBlob(room, numbers)
			return room[begin:len(room):len(room)]
		}
		if need := 8 * (len(p.X) + len(p.F) + len(p.G) + len(p.Extra)); cap(room) < need {
			room = make([]byte, 0, need)
		}
		x, f, g, extra := cut(p.X), cut(p.F), cut(p.G), cut(p.Extra)
		sum := checksum(first+i, x, f, g, extra, []byte(p.Cause))
		if _, err := statement.Exec(first+i, x, f, g, extra, p.Cause, sum); err != nil {
			return err
		}
	}
	return nil
}

// Recall fills dst with the stored points first, first+1, ... and returns how many there are.
func (a *Archive) Recall(first int, dst []optimize.Point) (int, error) {
	n := 0
	err := a.read(first, len(dst), func(seq int) *optimize.Point {
		n = seq - first + 1
		return &dst[seq-first]
	}, nil)
	if err != nil {
		return 0, err
	}
	return n, nil
}

// Each calls visit for every stored point in order. The point is valid until visit returns; its slices
// are used again. An error of visit ends the reading and is returned.
func (a *Archive) Each(visit func(seq int, p *optimize.Point) error) error {
	var p optimize.Point
	return a.read(0, -1, func(int) *optimize.Point { return &p }, visit)
}

// read goes through at most limit rows from first on (all when it is negative), fills the points that
// place gives and hands them to visit.
func (a *Archive) read(first, limit int, place func(seq int) *optimize.Point, visit func(int, *optimize.Point) error) (err error) {
	rows, err := a.db.Query("SELECT seq, x, f, g, extra, cause, sum FROM designs WHERE seq >= ? ORDER BY seq LIMIT ?", first, limit)
	if err != nil {
		return explain("read", a.file, err)
	}
	defer func() { err = errors.Join(err, explain("read", a.file, rows.Close())) }()
	next := first
	for rows.Next() {
		var (
			seq            int
			x, f, g, extra sql.RawBytes
			cause          string
			sum            int64
		)
		if err := rows.Scan(&seq, &x, &f, &g, &extra, &cause, &sum); err != nil {
			return &DamagedError{File: a.file, What: fmt.Sprintf("design %d cannot be read", next), Err: err}
		}
		if seq != next {
			return &DamagedError{File: a.file, What: fmt.Sprintf("design %d is missing", next)}
		}
		p := place(seq)
		ok := sum == checksum(seq, x, f, g, extra, []byte(cause))
		for _, part := range []struct {
			dst  *[]float64
			blob []byte
			n    int
		}{
			{&p.X, x, len(a.meta.Variables)}, {&p.F, f, a.meta.Aims},
			{&p.G, g, a.meta.Limits}, {&p.Extra, extra, len(a.meta.Extras)},
		} {
			var whole bool
			*part.dst, whole = readBlob(*part.dst, part.blob, part.n)
			ok = ok && whole
		}
		if !ok {
			return &DamagedError{File: a.file, What: fmt.Sprintf("design %d is not what was written", seq)}
		}
		p.Cause = cause
		if visit != nil {
			if err := visit(seq, p); err != nil {
				return err
			}
		}
		next++
	}
	return explain("read", a.file, rows.Err())
}
