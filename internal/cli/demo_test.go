package cli

import (
	"bufio"
	"encoding/json"
	"path/filepath"
	"strings"
	"testing"

	"hearduty/internal/diag"
	"hearduty/internal/schema"
)

func writeDemo(t *testing.T) string {
	t.Helper()
	dir := filepath.Join(t.TempDir(), "demo")
	if code, _, stderr := call("demo", dir); code != 0 {
		t.Fatal(stderr)
	}
	return dir
}

func fits(t *testing.T, name, text string) {
	t.Helper()
	var value any
	d := json.NewDecoder(strings.NewReader(text))
	d.UseNumber()
	if err := d.Decode(&value); err != nil {
		t.Fatal(err)
	}
	if problems := schema.Validate(name, value, func(p string) diag.Position { return diag.Position{Field: p, File: p} }); problems != nil {
		t.Fatalf("it does not fit the schema %s:\n%v", name, problems)
	}
}

func TestReportFitsItsSchema(t *testing.T) {
	code, stdout, stderr := call("check", writeDemo(t), "--format", "json", "--all", "--health-detail")
	if code != exitFound || stderr != "" {
		t.Fatalf("exit code %d: %s", code, stderr)
	}
	fits(t, "report", stdout)
}

func TestRecordsFitTheirSchemas(t *testing.T) {
	code, stdout, stderr := call("intake", writeDemo(t))
	if code != exitClean {
		t.Fatalf("exit code %d: %s", code, stderr)
	}
	kinds := map[string]int{}
	lines := bufio.NewScanner(strings.NewReader(stdout))
	for lines.Scan() {
		var record struct{ Record string }
		if err := json.Unmarshal(lines.Bytes(), &record); err != nil {
			t.Fatal(err)
		}
		kinds[record.Record]++
		fits(t, "record-"+strings.ReplaceAll(record.Record, "_", "-"), lines.Text())
	}
	if len(kinds) < 15 {
		t.Errorf("the demo program has few kinds of records: %v", kinds)
	}
}

func TestInterrupted(t *testing.T) {
	dir := writeDemo(t)
	env := testEnv()
	env.Context = cancelled()
	var out, errs strings.Builder
	if code := Main([]string{"hearduty", "check", dir}, nil, &out, &errs, env); code != exitFailed || out.String() != "" {
		t.Errorf("exit code %d, %q, %q", code, out.String(), errs.String())
	}
	if want := "hearduty: interrupted; nothing was written.\n"; errs.String() != want {
		t.Errorf("got %q, want %q", errs.String(), want)
	}
}
