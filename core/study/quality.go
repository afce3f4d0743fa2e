package study

import "slices"

// Quality is one item of the data-quality card of a case: what a simulation
// needs to know of a test.
type Quality struct {
	Case  string `json:"case"`
	Item  string `json:"item"`  // a name of QualityItems
	State string `json:"state"` // QualityKnown, QualityUnknown, or not stated
	Note  string `json:"note"`  // where it is documented
}

// States of an item.
const (
	QualityKnown   = "known"
	QualityUnknown = "unknown"
)

// QualityItems are what a test must tell for a simulation to repeat it (common
// practice, no source).
var QualityItems = []string{"inlet profiles", "inlet turbulence", "geometry as built", "wall temperature", "wall roughness"}

// QualityOf returns an item of a case, not stated where nothing was entered.
func (s *Study) QualityOf(caseName, item string) Quality {
	for _, q := range s.Quality {
		if q.Case == caseName && q.Item == item {
			return q
		}
	}
	return Quality{Case: caseName, Item: item}
}

// enterQuality changes an item of a case; the field is its number and "state"
// or "note".
func (s *Study) enterQuality(caseName, path, value string) (string, error) {
	i, field, ok := sourceField(path)
	if !ok || i >= len(QualityItems) {
		return "", refuse("an item of the data", path)
	}
	q := s.QualityOf(caseName, QualityItems[i])
	var before string
	var err error
	switch field {
	case "state":
		before, err = oneOf(&q.State, value, "", QualityKnown, QualityUnknown)
	case "note":
		before, err = exchange(&q.Note, value)
	default:
		err = refuse("an item of the data", path)
	}
	if err != nil {
		return before, err
	}
	s.Quality = append(slices.DeleteFunc(slices.Clone(s.Quality), func(o Quality) bool { return o.Case == q.Case && o.Item == q.Item }), q)
	return before, nil
}

// quality lists the card of the case, where any item of it was entered.
func (w *work) quality() {
	if !slices.ContainsFunc(w.e.study.Quality, func(q Quality) bool { return q.Case == w.q.Case }) {
		return
	}
	for _, item := range QualityItems {
		q := w.e.study.QualityOf(w.q.Case, item)
		w.cell.Quality = append(w.cell.Quality, QualityLine{Item: item, State: q.State, Note: q.Note})
	}
}
