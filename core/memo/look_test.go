package memo

import (
	"os"
	"testing"
)

func TestLook(t *testing.T) {
	d := os.Getenv("MEMO_LOOK")
	if d == "" {
		t.Skip()
	}
	os.WriteFile(d+"/memo.html", HTML(Document(sample())), 0o644)
	os.WriteFile(d+"/memo.md", Markdown(Document(sample())), 0o644)
}
