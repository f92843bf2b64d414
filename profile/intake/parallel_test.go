package intake

import (
	"sync"
	"testing"
)

// TestSideBySide: sites read at the same time do not mix; run with -race.
func TestSideBySide(t *testing.T) {
	want := mustRead(t, plain)
	var wg sync.WaitGroup
	for _, f := range []files{plain, imperial, plain, imperial} {
		wg.Go(func() {
			site, err := ReadFS(f.fs(), "site", Options{})
			if err != nil {
				t.Error(err)
				return
			}
			if d := differ(site, want); d != "" {
				t.Error(d)
			}
		})
	}
	wg.Wait()
}
