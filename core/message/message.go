// Package message is the one door to the core: a request goes in as JSON with
// attached bytes, one reply comes out the same way. The page's worker, the
// command and the edge service all move bytes to and from Handle and know
// nothing else of the core.
package message

import (
	"bytes"
	"encoding/json"

	"weirmark/core/notice"
	"weirmark/core/study"
	"weirmark/core/tablefile"
)

// Protocol numbers the shape of requests and replies.
const Protocol = 1

// Product and Version name the program.
const (
	Product = "Weirmark"
	Version = "0.1.0"
)

// Statuses of a reply; the command exits with them.
const (
	Done       = 0
	Incomplete = 2 // evidence is incomplete: an answer, not a fault
	Refused    = 3 // the input was refused, or the request was wrong
)

// Request asks for one thing. Attached bytes are referred to by position.
type Request struct {
	Protocol int    `json:"protocol"`
	Number   int    `json:"number"`
	Kind     string `json:"kind"`

	Names    []string          `json:"names,omitempty"` // of the attached files
	At       string            `json:"at,omitempty"`    // time of the host, for the log
	Target   *study.Target     `json:"target,omitempty"`
	Value    string            `json:"value,omitempty"`
	Why      string            `json:"why,omitempty"`
	Cell     string            `json:"cell,omitempty"`
	Theme    string            `json:"theme,omitempty"`
	Grids    *GridsRequest     `json:"grids,omitempty"`
	Compare  *CompareRequest   `json:"compare,omitempty"`
	Drawings map[string]string `json:"drawings,omitempty"` // svg elements by figure ID
}

// Reply answers one request. Files says what the bytes that come with it are.
type Reply struct {
	Protocol int            `json:"protocol"`
	Number   int            `json:"number"`
	Status   int            `json:"status"`
	Error    *notice.Notice `json:"error,omitempty"`
	About    *About         `json:"about,omitempty"`
	Read     *ReadReply     `json:"read,omitempty"`
	Grids    *[]GridsCase   `json:"grids,omitempty"`
	Compare  *CompareReply  `json:"compare,omitempty"`
	Results  *Results       `json:"results,omitempty"`
	View     *View          `json:"view,omitempty"`
	Walk     *WalkReply     `json:"walk,omitempty"`
	Files    []string       `json:"files,omitempty"`
}

// About says what answers.
type About struct {
	Product string `json:"product"`
	Version string `json:"version"`
	Edition string `json:"edition"`
}

// Types lists the shapes that hosts in other languages need.
func Types() []any { return []any{Request{}, Reply{}} }

// Session holds the study a page works on. The zero value holds none; requests
// that need no study work on it as well.
type Session struct {
	// Progress, where a host sets it, is called now and then while a large file
	// is read, with the bytes done of all.
	Progress func(done, total int)

	study    *study.Study
	past     []step // to go back to
	future   []step // to go forward to
	saved    int    // number of log entries when the study was last saved
	selected string
	theme    string
	read     map[string]tablefile.File // by hash and name
	memory   study.Memory              // of the last evaluation
	near     study.Memory              // of the cell last shown
	walk     *study.Walk               // in the report that the view was last made of
	walkOf   *study.Study              // whose report that is
	whole    bool                      // it holds of every cell what only a closer look gives
	notices  []notice.Notice           // of opening the study
}

// step is a state of the study and what was done on it next.
type step struct {
	study *study.Study
	what  string
}

// handler answers one kind of request.
type handler func(*Session, *Request, [][]byte, *Reply) ([][]byte, error)

var handlers map[string]handler

func init() {
	handlers = map[string]handler{
		"about": about, "read": readFile, "grids": grids, "compare": compare,
		"demo": demo, "new": blank, "open": open, "drop": drop, "save": save, "copy": copyStudy,
		"set": set, "accept": accept, "reveal": reveal, "select": choose,
		"add source": addSource, "remove source": removeSource, "remove file": removeFile, "exclude": exclude, "include": include, "answer": answer, "add item": addItem, "remove item": removeItem, "double": double, "accept like": acceptLike, "accept names": acceptNames,
		"undo": undo, "redo": redo, "view": view, "results": results, "walk": walkBack, "memo": writeMemo, "stations": writeStations,
	}
}

// Handle answers one request. What cannot be done is said in the reply; a
// panic is a fault of our own.
func (s *Session) Handle(request []byte, attached [][]byte) (reply []byte, files [][]byte) {
	var q Request
	r := Reply{Protocol: Protocol}
	decoder := json.NewDecoder(bytes.NewReader(request))
	decoder.DisallowUnknownFields()
	err := decoder.Decode(&q)
	r.Number = q.Number
	switch h, known := handlers[q.Kind]; {
	case err != nil:
		r.refuse(notice.New("request-damaged", err.Error()))
	case q.Protocol != Protocol:
		r.refuse(notice.New("request-protocol", q.Protocol, Protocol))
	case !known:
		r.refuse(notice.New("request-kind", q.Kind))
	default:
		files, err = h(s, &q, attached, &r)
		if err != nil {
			files = nil
			r.refuse(asNotice(err))
		}
	}
	return encode(r), files
}

func (r *Reply) refuse(n notice.Notice) {
	r.Status, r.Error = Refused, &n
}

func asNotice(err error) notice.Notice {
	if n, ok := err.(notice.Notice); ok {
		return n
	}
	return notice.New("study-error", err.Error())
}

// encode writes a reply; its types cannot fail to encode.
func encode(v any) []byte {
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	if err := e.Encode(v); err != nil {
		panic("message: " + err.Error())
	}
	return bytes.TrimRight(b.Bytes(), "\n")
}

func about(_ *Session, _ *Request, _ [][]byte, r *Reply) ([][]byte, error) {
	r.About = &About{Product, Version, study.Edition}
	return nil, nil
}

// attachedFile returns the attached bytes at a position, with their name.
func attachedFile(q *Request, attached [][]byte, i int) (string, []byte, error) {
	if i >= len(attached) || i >= len(q.Names) {
		return "", nil, notice.New("request-attachment", i+1)
	}
	return q.Names[i], attached[i], nil
}

// readOnce reads a file of the study, or answers from what was read before.
func (s *Session) readOnce(f study.File) tablefile.File {
	if have, ok := s.read[f.Key()]; ok && have.Size == len(f.Data) {
		return have
	}
	read := study.ReadTelling(f, s.Progress)
	s.keep(f, read)
	return read
}

// keep remembers what was read, if the bytes are those of the recorded hash.
func (s *Session) keep(f study.File, read tablefile.File) {
	if read.SHA256 != f.SHA256 {
		return
	}
	if s.read == nil {
		s.read = map[string]tablefile.File{}
	}
	s.read[f.Key()] = read
}
