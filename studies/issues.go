package studies

import (
	"cmp"
	"fmt"
	"slices"
	"strings"
)

// Code names a kind of mistake. For each there is a file testdata/bad/<code>.yaml.
type Code string

const (
	FileEmpty        Code = "file-empty"        // nothing in the file, or comments only
	FileTooBig       Code = "file-too-big"      // above 1 MB
	FileTooDeep      Code = "file-too-deep"     // nested deeper than any study is
	FileNotText      Code = "file-not-text"     // not UTF-8 text: a binary file, another encoding
	FileNotYAML      Code = "file-not-yaml"     // the text breaks the rules of YAML
	SeveralDocuments Code = "several-documents" // more than one YAML document
	YAMLFeature      Code = "yaml-feature"      // anchor, alias, tag or merge key
	KeyTwice         Code = "key-twice"         // the same key twice in one block
	KeyUnknown       Code = "key-unknown"       // no such key
	KeyMissing       Code = "key-missing"       // a key that is needed is not there
	ShapeWrong       Code = "shape-wrong"       // a block where a value belongs, or the other way round
	TextExpected     Code = "text-expected"     // a name or sentence is missing or too long
	NumberExpected   Code = "number-expected"   // text where a number belongs
	NumberFormat     Code = "number-format"     // 1,5 or 012 or 1_000
	WholeExpected    Code = "whole-expected"    // a fraction where a whole number belongs
	UnitUnknown      Code = "unit-unknown"      // no such unit
	UnitWrong        Code = "unit-wrong"        // a unit of another quantity
	OutOfRange       Code = "out-of-range"      // outside the physical range
	ChoiceUnknown    Code = "choice-unknown"    // not one of the choices
	DoesNotApply     Code = "does-not-apply"    // means nothing with this layout, drive or heat
	Contradiction    Code = "contradiction"     // two values that say the same thing twice or differently
	FreeNotPossible  Code = "free-not-possible" // this one cannot be freed
	FreeShape        Code = "free-shape"        // neither a range nor a list, or the wrong one of them
	FreeInverted     Code = "free-inverted"     // from is not below to
	FreeList         Code = "free-list"         // a list that is empty, not in order or holds one twice
	StartOutside     Code = "start-outside"     // the start design is outside the free range
	LimitUnknown     Code = "limit-unknown"     // no result or input of this name
	LimitNoBound     Code = "limit-no-bound"    // neither max nor min
	LimitInverted    Code = "limit-inverted"    // min above max
	AimsCount        Code = "aims-count"        // none, or more than three
	AimUnknown       Code = "aim-unknown"       // no result of this name
	AimDirection     Code = "aim-direction"     // neither most nor least
	ExprSyntax       Code = "expr-syntax"       // a formula that cannot be read
	ExprUnknown      Code = "expr-unknown"      // a name that a formula cannot use
	ExprDimension    Code = "expr-dimension"    // mm + bar, or a bound of another quantity
	BudgetInvalid    Code = "budget-invalid"    // not a whole number of evaluations from 1 to 1e9
	SeedInvalid      Code = "seed-invalid"      // not a whole number from 0 to 2^64 - 1
	Corrections      Code = "corrections"       // neither none nor a block of factors
	SetInvalid       Code = "set-invalid"       // not path=value, or a path that is no input

	// Warnings: the study is valid.
	Unusual       Code = "unusual"         // outside what engines of this kind have
	MayFail       Code = "may-fail"        // part of the free range cannot be built
	OutsideSearch Code = "outside-search"  // --set put the design outside its free range
	NothingToDo   Code = "nothing-to-free" // aims without anything free
)

// Codes lists all codes of mistakes, then those of warnings.
func Codes() []Code {
	return []Code{FileEmpty, FileTooBig, FileTooDeep, FileNotText, FileNotYAML, SeveralDocuments, YAMLFeature,
		KeyTwice, KeyUnknown, KeyMissing, ShapeWrong, TextExpected, NumberExpected, NumberFormat, WholeExpected,
		UnitUnknown, UnitWrong, OutOfRange, ChoiceUnknown, DoesNotApply, Contradiction,
		FreeNotPossible, FreeShape, FreeInverted, FreeList, StartOutside, LimitUnknown, LimitNoBound, LimitInverted,
		AimsCount, AimUnknown, AimDirection, ExprSyntax, ExprUnknown, ExprDimension, BudgetInvalid, SeedInvalid,
		Corrections, SetInvalid,
		Unusual, MayFail, OutsideSearch, NothingToDo}
}

// Warning says whether a study with this issue is still valid.
func (c Code) Warning() bool {
	return c == Unusual || c == MayFail || c == OutsideSearch || c == NothingToDo
}

// Issue is one mistake or warning, with its place.
type Issue struct {
	Code   Code
	File   string // the file, or the --set that holds it
	Line   int    // from 1; 0 when it belongs to no line
	Column int    // from 1, in characters
	Path   string // key, as free.heater.tube_count
	Text   string // what is wrong
	Hint   string // what to do; may be empty
}

// String writes the issue on one line.
func (i Issue) String() string {
	var b strings.Builder
	if i.File != "" {
		b.WriteString(i.File)
		if i.Line > 0 {
			fmt.Fprintf(&b, ":%d:%d", i.Line, i.Column)
		}
		b.WriteString(": ")
	}
	if i.Code.Warning() {
		b.WriteString("warning: ")
	}
	if i.Path != "" {
		b.WriteString(i.Path + ": ")
	}
	b.WriteString(i.Text)
	if i.Hint != "" {
		b.WriteString("; " + i.Hint)
	}
	return b.String()
}

// Issues is all that was found in one reading, in the order of the file.
type Issues []Issue

// Mistakes are the issues that make the study invalid.
func (is Issues) Mistakes() Issues { return is.with(false) }

// Warnings are the issues that leave the study valid.
func (is Issues) Warnings() Issues { return is.with(true) }

func (is Issues) with(warning bool) Issues {
	var out Issues
	for _, i := range is {
		if i.Code.Warning() == warning {
			out = append(out, i)
		}
	}
	return out
}

// Error writes one issue a line, the first fifty of them.
func (is Issues) Error() string {
	const most = 50
	var lines []string
	for i := range is[:min(most, len(is))] {
		lines = append(lines, is[i].String())
	}
	if more := len(is) - most; more > 0 {
		lines = append(lines, fmt.Sprintf("and %d more", more))
	}
	return strings.Join(lines, "\n")
}

func (is Issues) sort() {
	slices.SortStableFunc(is, func(a, b Issue) int {
		return cmp.Or(cmp.Compare(a.Line, b.Line), cmp.Compare(a.Column, b.Column))
	})
}
