package message

import (
	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/study"
)

// WalkReply is one number walked one step back, with its texts.
type WalkReply struct {
	Step  study.Step  `json:"step"`
	Shown string      `json:"shown"` // the number with its unit
	Said  []string    `json:"said"`  // formula, words, place, in the order of reading
	Ways  []WalkInput `json:"ways"`  // the inputs, to walk on
}

// WalkInput is a number that the formula takes, as text.
type WalkInput struct {
	Path string `json:"path"`
	Text string `json:"text"`
}

// walkBack walks the number at a path of the report one step back. Where the
// study is shown, that is the report it is shown from; what only a closer look
// gives of another cell is evaluated then.
func walkBack(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	if s.study == nil {
		return nil, notice.New("request-study")
	}
	var step study.Step
	err := error(notice.New("walk-unknown", q.Value))
	if s.walkOf == s.study {
		step, err = s.walk.Step(q.Value)
	}
	if missing := err != nil || !step.Value.Known() && len(step.Inputs) == 0; missing && !(s.whole && s.walkOf == s.study) {
		report := s.report()
		s.walk, s.walkOf, s.whole = study.NewWalk(s.study, study.Options{Read: s.readOnce}, &report), s.study, true
		step, err = s.walk.Step(q.Value)
	}
	if err != nil {
		return nil, err
	}
	r.Walk = walkReply(step)
	return nil, nil
}

func walkReply(step study.Step) *WalkReply {
	w := &WalkReply{Step: step, Said: []string{}, Ways: []WalkInput{}}
	if step.Value.Known() {
		w.Shown = numberText(step.Value, step.Unit)
	}
	say := func(text string) {
		if text != "" {
			w.Said = append(w.Said, text)
		}
	}
	say(step.Formula)
	say(step.Words)
	if o := step.Origin; o != nil {
		say(originWords(o))
	}
	switch {
	case step.Again.Known() && step.Agrees && len(step.Inputs) > 0:
		say("Computed again from the numbers below: the same.")
	case step.Again.Known() && !step.Agrees:
		say("Computed again from the numbers below: " + numberText(step.Again, step.Unit) + ". Other steps lie between.")
	}
	say(step.Why)
	for _, in := range step.Inputs {
		text := in.Name
		if in.N == 1 && in.Value.Known() {
			text += " = " + numberText(in.Value, "")
		} else if in.N != 1 {
			text += ": " + quantity.Counted(in.N, "number")
		}
		w.Ways = append(w.Ways, WalkInput{in.Path, text})
	}
	return w
}

// numberText prints a number of a walk with the digits of the report.
func numberText(n study.Number, unit string) string {
	text := quantity.Plain(quantity.Round(float64(n), 10), 10)
	if unit != "" && unit != "1" {
		text += " " + unit
	}
	return text
}

// originWords says where a number is written.
func originWords(o *study.Origin) string {
	if o.File == "" {
		return capitalised(o.Of) + ": “" + o.Text + "”."
	}
	text := "Written in " + o.File
	if o.Line > 0 {
		text += ", line " + quantity.Plain(float64(o.Line), 12)
	}
	if o.Column > 0 {
		text += ", field " + quantity.Plain(float64(o.Column), 12)
	}
	text += ", column " + o.Of
	if o.Text != "" {
		text += ": “" + o.Text + "”"
		if o.Unit != "" && o.Unit != "1" {
			text += " in " + o.Unit
		}
	}
	return text + "."
}
