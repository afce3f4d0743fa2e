package door

import (
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
	"io"
)

// attachedField is what the door adds to requests and replies: the bytes that go
// with them, each as base64.
const attachedField = "attached"

// open splits a body into the request and the bytes attached to it. The request
// keeps its fields as they were written and in their order, so that the core
// sees what a page would have sent. The error says what is wrong with the body.
func open(body []byte) (request []byte, attached [][]byte, err error) {
	decoder := json.NewDecoder(bytes.NewReader(body))
	if token, err := decoder.Token(); err != nil || token != json.Delim('{') {
		return nil, nil, errors.New("the body is no JSON object")
	}
	var rest bytes.Buffer
	rest.WriteByte('{')
	found := false
	for decoder.More() {
		token, err := decoder.Token()
		if err != nil {
			return nil, nil, fmt.Errorf("reading the body: %w", err)
		}
		name := token.(string) // the decoder has no other token before a value
		var value json.RawMessage
		if err := decoder.Decode(&value); err != nil {
			return nil, nil, fmt.Errorf("reading the field %q: %w", name, err)
		}
		if name == attachedField {
			if found {
				return nil, nil, fmt.Errorf("the field %q stands twice", name)
			}
			found = true
			if err := json.Unmarshal(value, &attached); err != nil {
				return nil, nil, fmt.Errorf("the field %q is no list of base64 texts: %w", name, err)
			}
			continue
		}
		if rest.Len() > 1 {
			rest.WriteByte(',')
		}
		quoted, err := json.Marshal(name)
		if err != nil {
			return nil, nil, err
		}
		rest.Write(quoted)
		rest.WriteByte(':')
		rest.Write(value)
	}
	if _, err := decoder.Token(); err != nil {
		return nil, nil, fmt.Errorf("reading the body: %w", err)
	}
	if _, err := decoder.Token(); err != io.EOF {
		return nil, nil, errors.New("something follows the JSON object")
	}
	rest.WriteByte('}')
	return rest.Bytes(), attached, nil
}

// seal puts the files into the reply as its last field; a reply without files
// is passed on as it is.
func seal(reply []byte, files [][]byte) ([]byte, error) {
	if len(files) == 0 {
		return reply, nil
	}
	inner, isObject := bytes.CutSuffix(reply, []byte("}"))
	if !isObject || !bytes.HasPrefix(inner, []byte("{")) {
		return nil, errors.New("the reply is no JSON object")
	}
	list, err := json.Marshal(files)
	if err != nil {
		return nil, err
	}
	sealed := bytes.Clone(inner)
	if len(inner) > 1 {
		sealed = append(sealed, ',')
	}
	sealed = append(sealed, `"`+attachedField+`":`...)
	sealed = append(sealed, list...)
	return append(sealed, '}'), nil
}
