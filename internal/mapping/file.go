// Package mapping says how the columns of an export become fields of records. A map is a YAML file; it is
// checked against a schema that is generated from the types here.
package mapping

// File is the form of a map file. Its JSON Schema is generated from here. Where a Column is a single
// name, the text alone may stand for it: {date: TestDate}.
type File struct {
	Map        string            `json:"map" doc:"title of the map: which export of which system it reads"`
	Kind       string            `json:"kind,omitempty" doc:"record kind that a row becomes, unless the program file names it"`
	Format     string            `json:"format,omitempty" enum:"delimited|workbook|json|lines|yaml|fhir" doc:"format of the file; found out if left out, except fhir"`
	Encoding   string            `json:"encoding,omitempty" doc:"code page of the text, such as windows-1252 or cp850; UTF-8 and UTF-16 are recognized"`
	Delimiter  string            `json:"delimiter,omitempty" enum:",|;|tab|pipe" doc:"what stands between cells; found out if left out"`
	Sheet      string            `json:"sheet,omitempty" doc:"sheet of a workbook; may be left out if only one is visible"`
	Head       *Head             `json:"head,omitempty" doc:"where the header stands; found out if left out: the first row that holds the columns named"`
	Rows       *Rows             `json:"rows,omitempty" doc:"which rows are data"`
	Numbers    *Numbers          `json:"numbers,omitempty" doc:"how numbers are written"`
	Dates      *Dates            `json:"dates,omitempty" doc:"how dates are written"`
	Blank      []string          `json:"blank,omitempty" doc:"cells that say that nothing is known, such as n/a or 31/12/9999"`
	Fields     map[string]Column `json:"fields,omitempty" doc:"where each field of the record comes from, by field name"`
	Records    []Part            `json:"records,omitempty" doc:"several records of one row, such as baseline and current test; each has its own fields beside the common ones"`
	Ear        *EarRows          `json:"ear,omitempty" doc:"for exports with one row an ear: which column tells the ear; fields are then named ear.500 and so on"`
	Frequency  *FrequencyRows    `json:"frequency,omitempty" doc:"for exports with one row a frequency, together with ear"`
	Thresholds *Thresholds       `json:"thresholds,omitempty" doc:"how hearing threshold levels are written"`
	Ignore     []string          `json:"ignore,omitempty" doc:"columns that are known and not wanted"`
	FHIR       *FHIR             `json:"fhir,omitempty" doc:"how FHIR resources become audiograms"`
}

// Head says where the header stands.
type Head struct {
	Row        int    `json:"row,omitempty" doc:"row of the header, from 1"`
	Rows       int    `json:"rows,omitempty" doc:"number of header rows, 1 or 2; the names of two rows are joined by a space, and a blank cell above goes on from its left"`
	None       bool   `json:"none,omitempty" doc:"there is no header; columns are named by position"`
	Transposed bool   `json:"transposed,omitempty" doc:"names stand in the first column and each further column is a record"`
	Above      string `json:"above,omitempty" enum:"key_value" doc:"lines above the header hold a key and a value each, which fields can use; separated by the delimiter or a colon"`
}

// Rows says which rows are data. What is no data is counted in the ledger all the same.
type Rows struct {
	Skip     []int       `json:"skip,omitempty" doc:"rows to pass over, from 1"`
	Comment  []string    `json:"comment,omitempty" doc:"rows whose first filled cell begins with one of these are comments"`
	Footer   []string    `json:"footer,omitempty" doc:"a row whose first filled cell begins with one of these ends the data"`
	Only     []Condition `json:"only,omitempty" doc:"only rows that meet all of these are data"`
	Hidden   string      `json:"hidden,omitempty" enum:"read|skip" doc:"what becomes of hidden rows of a workbook; read if left out"`
	Repeated string      `json:"repeated,omitempty" enum:"reject|skip" doc:"what becomes of a row that gives a record once more, such as the person on each row of tests; reject if left out"`
}

// Condition is met by a row whose cell is one of the words.
type Condition struct {
	Column   string   `json:"column,omitempty" doc:"name of the column"`
	Position int      `json:"position,omitempty" doc:"number of the column, from 1"`
	Is       []string `json:"is,omitempty" doc:"the cell is one of these"`
	IsNot    []string `json:"is_not,omitempty" doc:"the cell is none of these"`
	Filled   *bool    `json:"filled,omitempty" doc:"whether the cell holds anything"`
}

// Numbers says how numbers are written.
type Numbers struct {
	Decimal   string `json:"decimal,omitempty" enum:".|," doc:"decimal sign; a point if left out"`
	Thousands string `json:"thousands,omitempty" enum:".|,|space|'" doc:"sign between thousands; none if left out"`
}

// Dates says how dates are written.
type Dates struct {
	Order    string `json:"order,omitempty" enum:"day_month_year|month_day_year|year_month_day|proven" doc:"order of the parts of a date; proven: the dates of the file must settle it, and it is refused if they do not"`
	Latest   int    `json:"latest_two_digit_year,omitempty" doc:"the latest year that two digits can mean: with 2026, 26 is 2026 and 27 is 1927"`
	Calendar string `json:"calendar,omitempty" enum:"gregorian|buddhist" doc:"calendar of the years"`
	Serial   string `json:"serial,omitempty" enum:"1900|1904" doc:"numbers are days of a spreadsheet that counts from this year"`
	Zone     string `json:"zone,omitempty" doc:"time zone in which the day is taken where a time has a zone, such as Europe/Berlin, or as_written"`
}

// Column says where a field comes from: one of column, position, above, constant and make.
type Column struct {
	Column   Names             `json:"column,omitempty" doc:"name of the column, or several names of which the file has one; case, accents, blanks and signs do not matter"`
	Position int               `json:"position,omitempty" doc:"number of the column, from 1"`
	Above    string            `json:"above,omitempty" doc:"key of a line above the header"`
	Constant string            `json:"constant,omitempty" doc:"the same value for every row"`
	Make     []string          `json:"make,omitempty" doc:"fields of the same record, joined by a hyphen, such as [worker_id, date] for an id"`
	Values   map[string]string `json:"values,omitempty" doc:"what each cell means, such as {H: male, F: female}; case does not matter"`
	Others   string            `json:"others,omitempty" enum:"reject|keep|blank" doc:"what becomes of cells that values does not list; reject if left out"`
	Pad      int               `json:"pad,omitempty" doc:"ids of digits only are filled up with zeros to this length"`
	Strip    []string          `json:"strip,omitempty" doc:"beginnings of an id that are taken away, such as AUS-"`
	Prefix   string            `json:"prefix,omitempty" doc:"put before the id"`
	Case     string            `json:"case,omitempty" enum:"upper|lower" doc:"letters of an id are all made upper or lower case"`
	Unit     string            `json:"unit,omitempty" enum:"minutes|hours|clock|day_fraction|percent|fraction|hz|khz" doc:"unit of a number: a time in minutes, hours, as h:mm or as fraction of a day; a share in percent or as fraction; a frequency"`
	Order    string            `json:"order,omitempty" enum:"day_month_year|month_day_year|year_month_day|proven" doc:"order of the parts of this date, if it differs from dates"`
	Split    string            `json:"split,omitempty" doc:"what stands between the words of a list, if not a semicolon"`
	Blank    []string          `json:"blank,omitempty" doc:"cells of this column that say that nothing is known"`
}

// Names is one name or several.
type Names []string

// Part is one record of a row that holds several.
type Part struct {
	Fields map[string]Column `json:"fields" doc:"fields of this record beside the common ones, or in their place"`
	Only   []Condition       `json:"only,omitempty" doc:"the record is there only if the row meets all of these; if left out, if any of its own columns holds something"`
}

// EarRows tells the ear of a row.
type EarRows struct {
	Column   Names    `json:"column,omitempty" doc:"name of the column"`
	Position int      `json:"position,omitempty" doc:"number of the column, from 1"`
	Left     []string `json:"left" doc:"what the column says for the left ear"`
	Right    []string `json:"right" doc:"what the column says for the right ear"`
}

// FrequencyRows says how a row of one frequency is read.
type FrequencyRows struct {
	Frequency Column  `json:"frequency" doc:"column of the frequency; unit is hz or khz"`
	Threshold Column  `json:"threshold" doc:"column of the hearing threshold level"`
	Masked    *Column `json:"masked,omitempty" doc:"column that says whether the other ear was masked"`
}

// Thresholds says how hearing threshold levels are written. A number is always one in dB HL.
type Thresholds struct {
	NoResponse *NoResponse `json:"no_response,omitempty" doc:"how no response is written"`
	NotTested  []string    `json:"not_tested,omitempty" doc:"cells that say that the frequency was not tested, such as DNT or 888"`
	Masked     []string    `json:"masked,omitempty" doc:"signs around or behind a threshold that was taken with masking, such as m or []"`
}

// NoResponse says how no response is written. The highest level presented must be known: as the number
// beside a mark, or as the limit.
type NoResponse struct {
	Words  []string           `json:"words,omitempty" doc:"cells that say no response, such as NR or 666"`
	Marks  []string           `json:"marks,omitempty" doc:"signs before or behind the highest level presented, such as > or +"`
	Limit  float64            `json:"limit,omitempty" doc:"highest level presented, dB HL, at all frequencies that limits does not name"`
	Limits map[string]float64 `json:"limits,omitempty" doc:"highest level presented, dB HL, by frequency in Hz"`
}

// FHIR says how FHIR resources become audiograms.
type FHIR struct {
	WorkerFrom   string            `json:"worker_id_from,omitempty" enum:"identifier|patient_id" doc:"where the worker's id stands: an identifier of the patient, which is meant if left out, or the id of the Patient resource itself, as references hold it"`
	WorkerSystem string            `json:"worker_id_system,omitempty" doc:"system of the patient's identifier that is the worker's id; may be left out if patients have one identifier"`
	Purposes     []Coding          `json:"purposes,omitempty" doc:"codes that tell the purpose of the test"`
	Ignore       []string          `json:"ignore_resources,omitempty" doc:"resource types that may stand in the file and are not wanted"`
	Pad          int               `json:"pad,omitempty" doc:"ids of digits only are filled up with zeros to this length"`
	NoResponse   *NoResponse       `json:"no_response,omitempty" doc:"how no response is written where it is no comparator"`
	Fields       map[string]string `json:"constants,omitempty" doc:"fields with the same value in every audiogram"`
}

// Coding is a code of a code system and what it means here.
type Coding struct {
	System  string `json:"system,omitempty" doc:"code system"`
	Code    string `json:"code" doc:"code"`
	Purpose string `json:"purpose" enum:"baseline|periodic|retest|exit|other" doc:"purpose of the test"`
}
