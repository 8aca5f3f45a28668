package rulebook

import (
	"path"

	"gopkg.in/yaml.v3"
)

// origin tells from which bundle a parameter or paragraph comes: this one, or the nearest that it extends and that has
// it. Of a bundle that extends nothing there is nothing to tell.
func (m *maker) origin(what, name string) string {
	if len(m.Extends) == 0 {
		return ""
	}
	for _, id := range append([]string{m.ID}, m.Extends...) {
		file := path.Join(id, what, "data.yaml")
		if m.names[file] == nil {
			m.names[file] = map[string]yaml.Node{}
			_ = yaml.Unmarshal(m.Files[file], m.names[file]) // the loader has read it already
		}
		if _, ok := m.names[file][name]; ok {
			return id
		}
	}
	return ""
}
