package fhir

import (
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/mapping"
)

func patientWith(identifiers string) string {
	return `{"resourceType": "Patient", "id": "p7", "name": [{"family": "Quill"}], "identifier": [` + identifiers + `]}`
}

func TestWorkerIDs(t *testing.T) {
	t.Parallel()
	const payroll, health, old = `{"system": "urn:payroll", "value": "7"}`, `{"system": "urn:health", "value": "S-77"}`, `{"system": "urn:payroll", "value": "6", "use": "old"}`
	bySystem := &mapping.FHIR{WorkerSystem: "urn:payroll", Pad: 4}
	for _, c := range []struct {
		identifiers string
		options     *mapping.FHIR
		want        string
	}{
		{payroll, nil, "worker_id=7"},
		{payroll, &mapping.FHIR{Pad: 4}, "worker_id=0007"},
		{payroll + "," + health, bySystem, "worker_id=0007"},
		{payroll + "," + old, bySystem, "worker_id=0007"},
		{old, bySystem, "worker_id=0006"},
		{payroll + "," + payroll, nil, "worker_id=7"},
		{payroll + "," + health, nil, "the patient has several identifiers, of system urn:health, system urn:payroll"},
		{`{"value": "1"}, {"value": "2"}`, nil, "the patient has several identifiers, of no system"},
		{`{"system": "urn:payroll", "value": "1"}, {"system": "urn:payroll", "value": "2"}`, bySystem, "the patient has several identifiers of the system that the map names"},
		{health, bySystem, "the patient has no identifier of the system that the map names, but of system urn:health"},
		{``, bySystem, "the patient has no identifier"},
		{`{"value": 7}`, nil, "value is a number, not a text"},
		{`{"value": "1.23E+05"}`, nil, "a spreadsheet turned the id into a number in scientific notation, so digits of it may be lost"},
		{payroll + "," + health, &mapping.FHIR{WorkerFrom: "patient_id"}, "worker_id=p7"},
	} {
		got := readAll(t, bundleOf(patientWith(c.identifiers), toneText("o1", "89024-4", level("10"), "")), "a.json", mapping.File{FHIR: c.options})
		assert.Contains(t, got[1], c.want, c.identifiers)
		for _, secret := range []string{"Quill", "S-77"} {
			assert.NotContains(t, strings.Join(got, "\n"), secret)
		}
	}
}

func TestReferencesToPatients(t *testing.T) {
	t.Parallel()
	const own = `{"reference": "Patient/p7"}`
	byID := &mapping.FHIR{WorkerFrom: "patient_id"}
	for _, c := range []struct {
		patient, subject string
		options          *mapping.FHIR
		want             string
	}{
		{worker7, own, nil, "worker_id=0007"},
		{worker7, `{"reference": "Patient/p7/_history/3"}`, nil, "worker_id=0007"},
		{"urn:uuid:1 " + strings.Replace(worker7, `"id": "p7", `, "", 1), `{"reference": "urn:uuid:1"}`, nil, "worker_id=0007"},
		{"urn:uuid:1 " + worker7, `{"reference": "urn:uuid:1"}`, nil, "worker_id=0007"},
		{"urn:uuid:1 " + worker7, own, nil, "worker_id=0007"},
		{"https://a.example/fhir/Patient/p7 " + worker7, `{"reference": "https://a.example/fhir/Patient/p7"}`, nil, "worker_id=0007"},
		{"https://a.example/fhir/Patient/p7 " + worker7, own, nil, "worker_id=0007"},
		{worker7, `{"reference": "https://a.example/fhir/Patient/p7"}`, nil, "worker_id=0007"},
		{"https://b.example/fhir/Patient/p7 " + worker7, `{"reference": "https://a.example/fhir/Patient/p7"}`, nil, "the patient that the reference points to is not in the file"},
		{worker7, `{"reference": "Patient/p8"}`, nil, "the patient that the reference points to is not in the file"},
		{worker7, `{"reference": "Patient/p8"}`, byID, "worker_id=p8"},
		{worker7, `{"reference": "urn:uuid:9"}`, byID, "the patient that the reference points to is not in the file"},
		{worker7, `{"reference": "#p"}`, nil, "the patient is said to be contained in the resource, but is not there"},
		{worker7, `{"reference": "Group/g"}`, nil, "the subject is of type Group, not Patient"},
		{worker7, `{"reference": "urn:uuid:9", "type": "Device"}`, nil, "the subject is of type Device, not Patient"},
		{worker7, `{"identifier": {"system": "urn:harrow-slate:payroll", "value": "0007"}}`, nil, "worker_id=0007"},
		{worker7, `{"identifier": {"system": "urn:harrow-slate:payroll", "value": "0008"}}`, nil, "worker_id=0008"},
		{worker7, `{"identifier": {"system": "urn:x", "value": "0008"}}`, &mapping.FHIR{WorkerSystem: "urn:y"}, "the patient has no identifier of the system that the map names"},
		{worker7, `{"reference": "Patient/p8", "identifier": {"system": "urn:y", "value": "0008"}}`, &mapping.FHIR{WorkerSystem: "urn:y"}, "worker_id=0008"},
		{worker7, `{"display": "Quill"}`, nil, "the resource does not say whom it is about"},
		{worker7, `{"reference": 7}`, nil, "reference is a number, not a text"},
		{worker7, `[]`, nil, "subject is a list, not an object"},
		{`{"resourceType": "Device", "id": "d"}`, `{"reference": "urn:x"}`, nil, "the patient that the reference points to is not in the file"},
	} {
		text := strings.Replace(toneText("o1", "89024-4", level("10"), ""), own, c.subject, 1)
		got := readAll(t, bundleOf(c.patient, text), "a.json", mapping.File{FHIR: c.options})
		assert.Contains(t, got[1], c.want, c.subject)
	}
}

func TestPatientsThatContradictEachOther(t *testing.T) {
	t.Parallel()
	eight := strings.Replace(worker7, "0007", "0008", 1)
	tone := toneText("o1", "89024-4", level("10"), "")
	got := readAll(t, bundleOf(worker7, eight, tone), "a.json", mapping.File{})
	assert.Equal(t, "3: fault worker_id: the patient stands in the file several times, with different ids", got[2])
	got = readAll(t, bundleOf(worker7, worker7, tone), "a.json", mapping.File{})
	assert.Contains(t, got[2], "worker_id=0007")
	got = readAll(t, bundleOf("https://a.example/Patient/p7 "+worker7, "https://b.example/Patient/p7 "+eight, tone), "a.json", mapping.File{})
	assert.Equal(t, "3: fault worker_id: the reference fits several patients of the file", got[2])
}

func TestPeopleAndDevices(t *testing.T) {
	t.Parallel()
	device := `{"resourceType": "Device", "id": "d1", "identifier": [{"value": "AUD-3"}]}`
	tester := `{"resourceType": "Practitioner", "id": "t1", "identifier": [{"value": "T-9"}], "name": [{"family": "Quill"}]}`
	for more, want := range map[string]string{
		`, "device": {"reference": "Device/d1"}`:         " audiometer_id=AUD-3",
		`, "device": {"identifier": {"value": "AUD-4"}}`: " audiometer_id=AUD-4",
		`, "device": {"display": "Booth 2"}`:             " audiometer_id=Booth 2",
		`, "device": {"reference": "#d"}, "contained": [{"resourceType": "Device", "id": "d", "serialNumber": "S1"}]`: " audiometer_id=S1",
		`, "device": {"reference": "Device/d9"}`:                                              " | audiometer_id: the reference to the device leads to no single identifier, so the audiometer is not known",
		`, "performer": [{"reference": "Practitioner/t1", "display": "Quill"}]`:               " tester_id=T-9",
		`, "performer": [{"identifier": {"value": "T-8"}}, {"reference": "Organization/1"}]`:  " tester_id=T-8",
		`, "performer": [{"display": "Quill"}]`:                                               " | tester_id: the reference to the performer leads to no single identifier, so the tester is not known",
		`, "performer": [{"identifier": {"value": "T-8"}}, {"identifier": {"value": "T-7"}}]`: " | tester_id: several people made the test, so tester_id was left empty",
	} {
		got := readAll(t, bundleOf(worker7, device, tester, toneText("o1", "89024-4", level("10"), more)), "a.json", mapping.File{})
		assert.Equal(t, "4: audiogram_id=0007-2025-03-04 worker_id=0007 date=2025-03-04 left.500=10"+want, got[3], more)
	}
}

func TestPurposesAndConstants(t *testing.T) {
	t.Parallel()
	options := &mapping.FHIR{
		Purposes: []mapping.Coding{{System: "urn:why", Code: "A", Purpose: "periodic"}, {Code: "B", Purpose: "baseline"}},
		Fields:   map[string]string{"earphones": "insert", "room_id": "R1"},
	}
	encounter := `{"resourceType": "Encounter", "id": "e1", "reasonCode": [{"coding": [{"code": "B"}]}]}`
	for more, want := range map[string]string{
		``: "",
		`, "category": [{"coding": [{"system": "urn:why", "code": "A"}]}]`:                                    " purpose=periodic",
		`, "category": [{"coding": [{"system": "urn:other", "code": "A"}]}]`:                                  "",
		`, "meta": {"tag": [{"code": "B"}]}`:                                                                  " purpose=baseline",
		`, "encounter": {"reference": "Encounter/e1"}`:                                                        " purpose=baseline",
		`, "encounter": {"reference": "Encounter/e1"}, "meta": {"tag": [{"code": "A", "system": "urn:why"}]}`: "fault",
	} {
		got := readAll(t, bundleOf(worker7, encounter, panelText("A1", more+`, "component": [`+component("89024-4", level("10"))+`]`)), "a.json", mapping.File{FHIR: options})
		line := "3: audiogram_id=A1 worker_id=0007 date=2025-03-04" + want + " left.500=10 earphones=insert room_id=R1"
		if want == "fault" {
			line = "3: fault purpose: the codes tell of several purposes of the test"
		}
		assert.Equal(t, line, got[2], more)
	}
}
