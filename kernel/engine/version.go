package engine

// Version is that of Adjoin.
const Version = "0.1.0"

// Level is the version of the language.
const Level = "0.1"
