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
	var n int
	err := a.db.QueryRow("SELECT first + count FROM batches ORDER BY first DESC LIMIT 1").Scan(&n)
	if errors.Is(err, sql.ErrNoRows) {
		return 0, nil
	}
	if err != nil {
		return 0, explain("read", a.file, err)
	}
	return n, nil
}

// Record stores points under the numbers first, first+1, ... in one transaction. The numbers must follow
// on those that are stored. Of a point whose Extra is nil no further results are stored.
func (a *Archive) Record(first int, points []optimize.Point) error {
	if len(points) == 0 {
		return nil
	}
	if a.lock == nil {
		return fmt.Errorf("%w: %s is open for reading", ErrReadOnly, a.file)
	}
	s := a.meta.shape()
	for i := range points {
		if !s.fits(&points[i]) {
			panic("archive: a point of another problem")
		}
	}
	if first != a.stored {
		return fmt.Errorf("archive: write to %s: design %d does not follow on the %d designs stored", a.file, first, a.stored)
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
	if err := tx.Commit(); err != nil {
		return explain("commit to", a.file, err)
	}
	a.stored = first + len(points)
	return nil
}

func (a *Archive) insert(tx *sql.Tx, first int, points []optimize.Point) error {
	a.room = appendBatch(a.room[:0], points)
	if _, err := tx.Stmt(a.insertBatch).Exec(first, len(points), a.room, checksum(a.room, first, len(points))); err != nil {
		return err
	}
	a.room = appendResults(a.room[:0], points)
	if len(a.room) == 0 {
		return nil
	}
	_, err := tx.Stmt(a.insertResults).Exec(first, a.room, checksum(a.room, first))
	return err
}

// prepare makes an archive ready for Record.
func (a *Archive) prepare() (err error) {
	if a.stored, err = a.Len(); err != nil {
		return err
	}
	a.insertBatch, err = a.db.Prepare("INSERT INTO batches (first, count, data, sum) VALUES (?, ?, ?, ?)")
	if err != nil {
		return explain("write to", a.file, err)
	}
	a.insertResults, err = a.db.Prepare("INSERT INTO results (first, data, sum) VALUES (?, ?, ?)")
	return explain("write to", a.file, err)
}

// Recall fills dst with the stored points first, first+1, ... and returns how many there are. Extra is nil
// where no further results are stored.
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
// are used again, but for Extra, which is nil where no further results are stored. An error of visit ends the
// reading and is returned.
func (a *Archive) Each(visit func(seq int, p *optimize.Point) error) error {
	var p optimize.Point
	return a.read(0, -1, func(int) *optimize.Point { return &p }, visit)
}

// read goes through at most limit designs from first on (all when it is negative), fills the points that
// place gives and hands them to visit, which may be nil.
func (a *Archive) read(first, limit int, place func(seq int) *optimize.Point, visit func(int, *optimize.Point) error) (err error) {
	if limit == 0 {
		return nil
	}
	rows, err := a.db.Query(`SELECT b.first, b.count, b.data, b.sum, r.data, r.sum FROM batches b LEFT JOIN results r ON r.first = b.first
		WHERE b.first >= coalesce((SELECT max(first) FROM batches WHERE first <= ?), 0) ORDER BY b.first`, first)
	if err != nil {
		return explain("read", a.file, err)
	}
	defer func() { err = errors.Join(err, explain("read", a.file, rows.Close())) }()
	var b batch
	var passed optimize.Point // of the first row, before first
	next := -1                // number that the next row must begin with; any up to first for the first row
	for rows.Next() {
		if err := a.scan(rows, &b, max(next, 0)); err != nil {
			return err
		}
		if next < 0 && b.first <= first {
			next = b.first
		}
		if b.first != max(next, 0) {
			return &DamagedError{File: a.file, What: fmt.Sprintf("design %d is missing", max(next, 0))}
		}
		for len(b.flags) > 0 {
			seq := next
			next++
			p := &passed
			if seq >= first {
				p = place(seq)
			}
			if !b.next(p) {
				return a.changed(b.first)
			}
			if seq < first {
				continue
			}
			if visit != nil {
				if err := visit(seq, p); err != nil {
					return err
				}
			}
			if limit > 0 && seq == first+limit-1 {
				return nil
			}
		}
	}
	return explain("read", a.file, rows.Err())
}

// scan reads a row and holds it against its sums. next is the number that was expected, for the message.
func (a *Archive) scan(rows *sql.Rows, b *batch, next int) error {
	var (
		first, count  int
		sum           int64
		data, results []byte
		resultsSum    sql.NullInt64
	)
	if err := rows.Scan(&first, &count, &data, &sum, &results, &resultsSum); err != nil {
		return &DamagedError{File: a.file, What: fmt.Sprintf("the designs from %d on cannot be read", next), Err: err}
	}
	if sum != checksum(data, first, count) || !b.parse(first, count, data, a.meta.shape()) {
		return a.changed(first)
	}
	switch {
	case b.stored > 0 && !resultsSum.Valid:
		return &DamagedError{File: a.file, What: fmt.Sprintf("results of the designs from %d on are missing", first)}
	case resultsSum.Valid && resultsSum.Int64 != checksum(results, first), len(results) != 8*b.stored*b.shape.extra:
		return a.changed(first)
	}
	b.results = results
	return nil
}

// changed is the error of a row whose sum is wrong.
func (a *Archive) changed(first int) error {
	return &DamagedError{File: a.file, What: fmt.Sprintf("what is stored of the designs from %d on is not what was written", first)}
}
