// Package unit reads quantities as people write them and shows SI values in
// the units a reader wants. Conversion happens here and nowhere else.
package unit
