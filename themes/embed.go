// Package themes embeds the built-in look: templates, style sheets and the
// browser's scripts. It stands here because embedding cannot look upwards.
package themes

import "embed"

// Files are the theme's files by name.
//
//go:embed *.tmpl *.css *.js *.svg
var Files embed.FS
