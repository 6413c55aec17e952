// Package order has finite partially ordered sets, such as the subfields of a
// field or the subgroups of a group under inclusion: covers, ranks, extremal
// elements and linear extensions. What the elements are, it does not know; it
// draws nothing.
//
// Where to start reading: order.go; New makes an order from its relation.
package order
