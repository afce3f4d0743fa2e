package message

import (
	"strconv"

	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/study"
)

// demo opens the demo campaign: as received, worked through, or with one byte
// altered for a checker.
func demo(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	switch q.Value {
	case "received":
		s.start(DemoReceived(s.readOnce), nil)
	case "worked":
		s.start(DemoWorked(), nil)
	case "review":
		s.start(DemoReview(), nil)
	case "": // one case of it, worked through
		s.start(Demo(), nil)
	default:
		return nil, notice.New("request-state", q.Value)
	}
	return show(s, q, r)
}

// blank opens an empty study.
func blank(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	s.start(study.New(), nil)
	return show(s, q, r)
}

// open opens an attached study document.
func open(s *Session, q *Request, attached [][]byte, r *Reply) ([][]byte, error) {
	_, data, err := attachedFile(q, attached, 0)
	if err != nil {
		return nil, err
	}
	opened, notices, err := study.Load(data)
	if err != nil {
		return nil, asNotice(err).In(q.Names[0])
	}
	s.start(opened, notices)
	return show(s, q, r)
}

func (s *Session) start(opened *study.Study, notices []notice.Notice) {
	s.study, s.past, s.future, s.selected, s.notices = opened, nil, nil, "", notices
	s.saved = len(opened.Log)
}

// show answers with the view, unless the host wants none.
func show(s *Session, q *Request, r *Reply) ([][]byte, error) {
	if q.Theme != "" {
		s.theme = q.Theme
	}
	v, err := s.view()
	r.View = v
	return nil, err
}

func view(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	if s.study == nil {
		return nil, notice.New("request-study")
	}
	return show(s, q, r)
}

func choose(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	if s.study == nil {
		return nil, notice.New("request-study")
	}
	s.selected = q.Cell
	return show(s, q, r)
}

// change does one operation on a copy of the study and keeps the state before
// it, so that a refused operation changes nothing.
func (s *Session) change(q *Request, r *Reply, do func(*study.Study) error) ([][]byte, error) {
	if s.study == nil {
		return nil, notice.New("request-study")
	}
	next := s.study.Clone()
	if err := do(next); err != nil {
		return nil, err
	}
	what := ""
	if n := len(next.Log); n > len(s.study.Log) {
		what = next.Log[n-1].What
	}
	s.past, s.future = append(s.past, step{s.study, what}), nil
	s.study = next
	return show(s, q, r)
}

func (q *Request) target() study.Target {
	if q.Target == nil {
		return study.Target{}
	}
	return *q.Target
}

func set(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	return s.change(q, r, func(n *study.Study) error { return n.Set(q.target(), q.Value, q.At, q.Why) })
}

func accept(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	return s.change(q, r, func(n *study.Study) error { return n.Accept(q.target(), q.At) })
}

func reveal(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	return s.change(q, r, func(n *study.Study) error {
		if q.Value == study.Locked { // with all stations, on one keystroke
			return n.RevealPlanned(q.target().ID, q.At)
		}
		return n.Reveal(q.target().ID, q.At)
	})
}

func addSource(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	return s.change(q, r, func(n *study.Study) error { return n.AddSource(q.target(), q.Value, q.At) })
}

func removeSource(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	return s.change(q, r, func(n *study.Study) error { return n.RemoveSource(q.target(), q.At, q.Why) })
}

func addItem(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	return s.change(q, r, func(n *study.Study) error { return n.AddItem(q.target(), q.At) })
}

func removeItem(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	return s.change(q, r, func(n *study.Study) error { return n.RemoveItem(q.target(), q.At, q.Why) })
}

func removeFile(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	return s.change(q, r, func(n *study.Study) error { return n.Remove(q.target().ID, q.At, q.Why) })
}

func double(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	return s.change(q, r, func(n *study.Study) error { return n.Double(q.target().ID, q.At) })
}

func acceptLike(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	return s.change(q, r, func(n *study.Study) error { return n.Like(q.target().ID, s.like(q.target().ID), q.At) })
}

func acceptNames(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	return s.change(q, r, func(n *study.Study) error { return n.AcceptNames(q.Value, q.At) })
}

func exclude(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	return s.change(q, r, func(n *study.Study) error { return n.Exclude(q.target(), q.Why, q.At) })
}

func include(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	return s.change(q, r, func(n *study.Study) error { return n.Include(q.target(), q.At) })
}

func answer(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	return s.change(q, r, func(n *study.Study) error { return n.Answer(q.target(), q.Value, q.At) })
}

// drop takes attached files into the study.
func drop(s *Session, q *Request, attached [][]byte, r *Reply) ([][]byte, error) {
	if s.study == nil {
		s.start(study.New(), nil)
	}
	return s.change(q, r, func(n *study.Study) error {
		for i := range attached {
			name, data, err := attachedFile(q, attached, i)
			if err != nil {
				return err
			}
			f := study.File{Name: name, Data: data}
			read := study.ReadTelling(f, s.Progress)
			f.SHA256 = read.SHA256
			s.keep(f, read)
			n.Add(name, data, read, q.At)
		}
		return nil
	})
}

// undo goes one step back. The log is only ever added to: going back is an
// entry of its own.
func undo(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	if len(s.past) == 0 {
		return nil, notice.New("request-undo", "undo")
	}
	last := s.past[len(s.past)-1]
	s.past = s.past[:len(s.past)-1]
	s.future = append(s.future, step{s.study, last.what})
	s.move(last.study, "Undone: "+last.what, q.At)
	return show(s, q, r)
}

// redo goes one step forward again.
func redo(s *Session, q *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	if len(s.future) == 0 {
		return nil, notice.New("request-undo", "redo")
	}
	next := s.future[len(s.future)-1]
	s.future = s.future[:len(s.future)-1]
	s.past = append(s.past, step{s.study, next.what})
	s.move(next.study, "Redone: "+next.what, q.At)
	return show(s, q, r)
}

// move takes another state of the study with the log as it stands.
func (s *Session) move(to *study.Study, what, when string) {
	log := s.study.Log
	s.study = to.Clone()
	s.study.Log = append([]study.Entry{}, log...)
	s.study.Note(what, when)
}

// save returns the study document.
func save(s *Session, _ *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	if s.study == nil {
		return nil, notice.New("request-study")
	}
	data, err := s.study.Save()
	if err != nil {
		return nil, err
	}
	s.saved = len(s.study.Log)
	r.Files = []string{fileName(s.study.Title, "study.json")}
	return [][]byte{data}, nil
}

// mostCopied is the number of bytes of files above which no copy is made: the
// document writes them as text, which would take several times their memory.
const mostCopied = 64 << 20

// copyStudy returns the study document for the host's own use, such as a new
// start; the study does not count as saved by it.
func copyStudy(s *Session, q *Request, attached [][]byte, r *Reply) ([][]byte, error) {
	if s.study != nil {
		if size := s.study.Size(); size > mostCopied {
			return nil, notice.New("study-uncopied", quantity.Text(float64(size)/1e6, 3))
		}
	}
	saved := s.saved
	files, err := save(s, q, attached, r)
	s.saved = saved
	return files, err
}

// fileName makes the name of a file to save from a title.
func fileName(title, ending string) string {
	name := []rune{}
	for _, c := range title {
		switch {
		case c >= 'a' && c <= 'z', c >= 'A' && c <= 'Z', c >= '0' && c <= '9':
			name = append(name, c)
		case len(name) > 0 && name[len(name)-1] != '-':
			name = append(name, '-')
		}
		if len(name) == 40 {
			break
		}
	}
	for len(name) > 0 && name[len(name)-1] == '-' {
		name = name[:len(name)-1]
	}
	if len(name) == 0 {
		return ending
	}
	return string(name) + "." + ending
}

// cellID names a cell of the report, by its position.
func cellID(i int) string { return "c" + strconv.Itoa(i+1) }
