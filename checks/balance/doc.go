// Package balance solves steady heat balances: nodes at unknown or fixed
// temperature joined by links whose heat is any function of both ends.
package balance
