package studies

import (
	"fmt"
	"strings"
)

// overrides puts the values of --set in place of the file's; they are then checked like those of
// the file. A later one of the same path counts.
func (r *reader) overrides(sets []string) {
	for _, set := range sets {
		path, text, ok := strings.Cut(set, "=")
		path, text = strings.TrimSpace(path), strings.TrimSpace(text)
		p := place{set: clip(set)}
		if set == "" {
			p.set = `""`
		}
		s := scalar{text: text, place: p}
		name, isFactor := strings.CutPrefix(path, "corrections.")
		path = strings.TrimPrefix(path, "engine.") // as messages about the file name it
		f, isInput := FieldNamed(r.fields, path)
		switch {
		case !ok || path == "" || text == "":
			r.fault(p, "", &fault{SetInvalid, "not of the form path=value", "as in heater.tube_count=40"})
		case path == "corrections":
			r.correctionsWord(s)
		case isFactor && contains(correctionNames(), name):
			r.factor[name] = s
			delete(r.factor, "set") // no longer that set
		case isInput:
			for i := range r.fields {
				if o := &r.fields[i]; f.Group != "" && o.Group == f.Group {
					delete(r.raw, o.Path)
					delete(r.bad, o.Path)
				}
			}
			delete(r.bad, path)
			r.raw[path] = s
		default:
			candidates := fieldPaths(r.fields)
			for _, c := range correctionNames() {
				candidates = append(candidates, "corrections."+c)
			}
			hint := suggestion(path, candidates)
			if hint == "" {
				hint = "`hotfront fields` lists the paths"
			}
			r.fault(p, "", &fault{SetInvalid, fmt.Sprintf("no input has the path %q", clip(path)), hint})
		}
	}
}
