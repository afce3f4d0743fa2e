package door

import (
	"encoding/json"
	"errors"
	"io"
	"log"
	"mime"
	"net/http"
	"runtime/debug"
)

// Path is where messages are answered.
const Path = "/v1/message"

// Limit is the most bytes that a body may have.
const Limit = 4 << 20

// Handle answers a request of the core; message.Session has one.
type Handle func(request []byte, attached [][]byte) (reply []byte, files [][]byte)

// Handler returns the service; session gives each call a session of its own.
func Handler(session func() Handle) http.Handler {
	return http.HandlerFunc(func(w http.ResponseWriter, r *http.Request) {
		strict(w.Header())
		switch {
		case r.URL.Path != Path:
			refuse(w, http.StatusNotFound, "nothing is at this address")
		case r.Method != http.MethodPost:
			w.Header().Set("Allow", http.MethodPost)
			refuse(w, http.StatusMethodNotAllowed, "messages come by POST")
		case !isJSON(r.Header.Get("Content-Type")):
			// Another site's form cannot send this type unasked.
			refuse(w, http.StatusUnsupportedMediaType, "the content type must be application/json")
		default:
			answer(w, r, session())
		}
	})
}

func answer(w http.ResponseWriter, r *http.Request, handle Handle) {
	body, err := readLimited(r.Body)
	if err != nil {
		status := http.StatusBadRequest
		if errors.Is(err, errTooLarge) {
			status = http.StatusRequestEntityTooLarge
		}
		refuse(w, status, err.Error())
		return
	}
	request, attached, err := open(body)
	if err != nil {
		refuse(w, http.StatusBadRequest, err.Error())
		return
	}
	// A panic would end the instance without an answer, so that the runtime gives
	// one of its own without our headers. It is told here and in the service's log.
	defer func() {
		if cause := recover(); cause != nil {
			log.Printf("the core failed: %v\n%s", cause, debug.Stack())
			refuse(w, http.StatusInternalServerError, "the core failed at this request")
		}
	}()
	sealed, err := seal(handle(request, attached))
	if err != nil {
		refuse(w, http.StatusInternalServerError, err.Error())
		return
	}
	w.WriteHeader(http.StatusOK)
	w.Write(sealed)
}

var errTooLarge = errors.New("the body has more than 4 MiB")

// readLimited reads a body, and no more of it than one byte over the limit.
func readLimited(body io.Reader) ([]byte, error) {
	content, err := io.ReadAll(io.LimitReader(body, Limit+1))
	if err != nil {
		return nil, err
	}
	if len(content) > Limit {
		return nil, errTooLarge
	}
	return content, nil
}

func isJSON(contentType string) bool {
	name, _, err := mime.ParseMediaType(contentType)
	return err == nil && name == "application/json"
}

// strict sets the headers of every answer: it is JSON, read as nothing else,
// kept nowhere, shown in no frame.
func strict(h http.Header) {
	h.Set("Content-Type", "application/json")
	h.Set("Cache-Control", "no-store")
	h.Set("Content-Security-Policy", "default-src 'none'; frame-ancestors 'none'")
	h.Set("Cross-Origin-Resource-Policy", "same-origin")
	h.Set("Referrer-Policy", "no-referrer")
	h.Set("X-Content-Type-Options", "nosniff")
}

// refuse answers with a status and the reason as JSON.
func refuse(w http.ResponseWriter, status int, reason string) {
	text, err := json.Marshal(map[string]string{"refused": reason})
	if err != nil {
		panic(err) // strings always are JSON
	}
	w.WriteHeader(status)
	w.Write(text)
}
