package archive

import (
	"database/sql"
	"fmt"
	"strconv"
	"strings"
	"time"
)

// Identity is what a run computes: runs of equal identity have equal designs, number by number.
type Identity struct {
	Fingerprint string // of the study, without seed and model version
	Model       string // version of the model
	Seed        uint64
	Driver      string
	Population  int // as asked for, 0 for the driver's default
}

// Meta is all that an archive says about its run. Only the identity and the layout of the numbers have to
// agree when a run is taken up again; the rest stays as it was when the run began.
type Meta struct {
	Identity

	Name      string    // of the study
	Text      string    // the study file as given
	Canonical string    // the study as it was understood
	Program   string    // version of the program that began the run
	Created   time.Time // when the run began, to the second, UTC

	Variables []string  // names of Point.X
	Aims      int       // length of Point.F
	Limits    int       // length of Point.G
	Extras    []string  // names of Point.Extra
	Reference []float64 // of the hypervolume [unit of each aim]
}

// pairs lists the meta data as they are stored.
func (m *Meta) pairs() [][2]string {
	return [][2]string{
		{"study", m.Text},
		{"canonical", m.Canonical},
		{"name", m.Name},
		{"fingerprint", m.Fingerprint},
		{"model", m.Model},
		{"program", m.Program},
		{"seed", strconv.FormatUint(m.Seed, 10)},
		{"driver", m.Driver},
		{"population", strconv.Itoa(m.Population)},
		{"created", m.Created.UTC().Format(time.RFC3339)},
		{"variables", strings.Join(m.Variables, "\n")},
		{"aims", strconv.Itoa(m.Aims)},
		{"limits", strconv.Itoa(m.Limits)},
		{"extras", strings.Join(m.Extras, "\n")},
		{"reference", string(appendNumbers(m.Reference))},
	}
}

// appendNumbers writes numbers exactly, as text.
func appendNumbers(numbers []float64) []byte {
	var b []byte
	for i, v := range numbers {
		if i > 0 {
			b = append(b, ' ')
		}
		b = strconv.AppendFloat(b, v, 'g', -1, 64)
	}
	return b
}

func writeMeta(tx *sql.Tx, m *Meta) error {
	for _, p := range m.pairs() {
		if _, err := tx.Exec("INSERT INTO meta (key, value) VALUES (?, ?)", p[0], p[1]); err != nil {
			return err
		}
	}
	return nil
}

// readMeta reads what writeMeta wrote. The error says which entry is missing or cannot be read.
func readMeta(db *sql.DB) (Meta, error) {
	stored := map[string]string{}
	rows, err := db.Query("SELECT key, value FROM meta")
	if err != nil {
		return Meta{}, err
	}
	defer rows.Close()
	for rows.Next() {
		var key, value string
		if err := rows.Scan(&key, &value); err != nil {
			return Meta{}, err
		}
		stored[key] = value
	}
	if err := rows.Err(); err != nil {
		return Meta{}, err
	}
	var m Meta
	for _, p := range m.pairs() {
		if _, ok := stored[p[0]]; !ok {
			return Meta{}, fmt.Errorf("%w: no %s", errMeta, p[0])
		}
	}
	m.Text, m.Canonical, m.Name = stored["study"], stored["canonical"], stored["name"]
	m.Fingerprint, m.Model, m.Program, m.Driver = stored["fingerprint"], stored["model"], stored["program"], stored["driver"]
	m.Variables, m.Extras = words(stored["variables"], "\n"), words(stored["extras"], "\n")
	var bad error
	note := func(key string, err error) {
		if err != nil && bad == nil {
			bad = fmt.Errorf("%w: %s is %q", errMeta, key, stored[key])
		}
	}
	m.Seed, err = strconv.ParseUint(stored["seed"], 10, 64)
	note("seed", err)
	m.Population, err = strconv.Atoi(stored["population"])
	note("population", err)
	m.Aims, err = strconv.Atoi(stored["aims"])
	note("aims", err)
	m.Limits, err = strconv.Atoi(stored["limits"])
	note("limits", err)
	m.Created, err = time.Parse(time.RFC3339, stored["created"])
	note("created", err)
	for _, w := range words(stored["reference"], " ") {
		v, err := strconv.ParseFloat(w, 64)
		note("reference", err)
		m.Reference = append(m.Reference, v)
	}
	if bad == nil && (m.Aims < 1 || m.Limits < 0 || len(m.Reference) != m.Aims || len(m.Variables) == 0) {
		bad = fmt.Errorf("%w: counts contradict each other", errMeta)
	}
	return m, bad
}

const errMeta = Error("what the run is cannot be read")

func words(s, separator string) []string {
	if s == "" {
		return nil
	}
	return strings.Split(s, separator)
}

// differences lists in what a stored run differs from the one asked for.
func differences(stored, asked *Meta) []Difference {
	var list []Difference
	add := func(what, a, b string) {
		if a != b {
			list = append(list, Difference{what, a, b})
		}
	}
	if stored.Fingerprint != asked.Fingerprint {
		list = append(list, Difference{What: "study"})
	}
	add("seed", strconv.FormatUint(stored.Seed, 10), strconv.FormatUint(asked.Seed, 10))
	add("model version", stored.Model, asked.Model)
	add("driver", stored.Driver, asked.Driver)
	add("population", strconv.Itoa(stored.Population), strconv.Itoa(asked.Population))
	if len(list) == 0 && (strings.Join(stored.Extras, " ") != strings.Join(asked.Extras, " ") ||
		strings.Join(stored.Variables, " ") != strings.Join(asked.Variables, " ") ||
		stored.Aims != asked.Aims || stored.Limits != asked.Limits) {
		list = append(list, Difference{What: "list of results"})
	}
	return list
}
