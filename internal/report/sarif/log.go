package sarif

// The types below are the part of SARIF 2.1.0 that is written here. Their names are those of the standard.

type log struct {
	Schema  string `json:"$schema"`
	Version string `json:"version"`
	Runs    []run  `json:"runs"`
}

type run struct {
	Tool               tool                        `json:"tool"`
	AutomationDetails  automation                  `json:"automationDetails"`
	Invocations        []invocation                `json:"invocations"`
	OriginalURIBaseIDs map[string]artifactLocation `json:"originalUriBaseIds"`
	ColumnKind         string                      `json:"columnKind"`
	Artifacts          []artifact                  `json:"artifacts"`
	Properties         map[string]any              `json:"properties"`
	Results            []result                    `json:"results"`
}

type tool struct {
	Driver driver `json:"driver"`
}

type driver struct {
	Name            string       `json:"name"`
	Version         string       `json:"version,omitempty"`
	SemanticVersion string       `json:"semanticVersion,omitempty"`
	FullDescription message      `json:"fullDescription"`
	Rules           []rule       `json:"rules"`
	Notifications   []descriptor `json:"notifications"`
}

type rule struct {
	ID                   string         `json:"id"`
	Name                 string         `json:"name"`
	ShortDescription     *message       `json:"shortDescription,omitempty"`
	FullDescription      *message       `json:"fullDescription,omitempty"`
	Help                 *message       `json:"help,omitempty"`
	DefaultConfiguration configuration  `json:"defaultConfiguration"`
	Properties           map[string]any `json:"properties"`
}

type configuration struct {
	Level string `json:"level"`
}

type descriptor struct {
	ID               string  `json:"id"`
	ShortDescription message `json:"shortDescription"`
}

type message struct {
	Text string `json:"text"`
}

type automation struct {
	ID          string  `json:"id"`
	Description message `json:"description"`
}

type invocation struct {
	ExecutionSuccessful        bool           `json:"executionSuccessful"`
	ToolExecutionNotifications []notification `json:"toolExecutionNotifications"`
}

type notification struct {
	Descriptor reference  `json:"descriptor"`
	Level      string     `json:"level"`
	Message    message    `json:"message"`
	Locations  []location `json:"locations,omitempty"`
}

type reference struct {
	ID    string `json:"id"`
	Index int    `json:"index"`
}

type artifact struct {
	Location artifactLocation  `json:"location"`
	Roles    []string          `json:"roles"`
	Hashes   map[string]string `json:"hashes,omitempty"`
}

type artifactLocation struct {
	URI         string   `json:"uri,omitempty"`
	URIBaseID   string   `json:"uriBaseId,omitempty"`
	Index       *int     `json:"index,omitempty"`
	Description *message `json:"description,omitempty"`
}

type location struct {
	ID               *int              `json:"id,omitempty"`
	PhysicalLocation *physicalLocation `json:"physicalLocation,omitempty"`
	LogicalLocations []logicalLocation `json:"logicalLocations,omitempty"`
	Message          *message          `json:"message,omitempty"`
}

type physicalLocation struct {
	ArtifactLocation artifactLocation `json:"artifactLocation"`
	Region           *region          `json:"region,omitempty"`
}

type region struct {
	StartLine int `json:"startLine"`
}

type logicalLocation struct {
	Name               string `json:"name"`
	FullyQualifiedName string `json:"fullyQualifiedName"`
	Kind               string `json:"kind"`
}

type result struct {
	RuleID              string            `json:"ruleId"`
	RuleIndex           int               `json:"ruleIndex"`
	Kind                string            `json:"kind"`
	Level               string            `json:"level"`
	Message             message           `json:"message"`
	Locations           []location        `json:"locations"`
	RelatedLocations    []location        `json:"relatedLocations,omitempty"`
	PartialFingerprints map[string]string `json:"partialFingerprints"`
	Suppressions        *[]suppression    `json:"suppressions,omitempty"`
	Properties          map[string]any    `json:"properties"`
}

type suppression struct {
	Kind          string         `json:"kind"`
	Status        string         `json:"status"`
	Justification string         `json:"justification"`
	Location      *location      `json:"location,omitempty"`
	Properties    map[string]any `json:"properties"`
}
