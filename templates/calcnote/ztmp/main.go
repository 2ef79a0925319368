package main

import (
	"bytes"
	"fmt"
	"os"
	"time"

	"stillair/checks"
	"stillair/checks/casefile"
	"stillair/templates/calcnote"
	"stillair/templates/starter"
)

func main() {
	for _, name := range os.Args[1:] {
		text, ok := starter.Get(name)
		if !ok {
			fmt.Println("no", name)
			continue
		}
		f, finds := casefile.Read(name+".yaml", text, casefile.Defaults{})
		for _, x := range finds {
			fmt.Println(x.Line, x.Message)
		}
		if f == nil {
			continue
		}
		o := checks.Run(f, checks.Program{Name: "stillair", Version: "v0.1.0", Data: "0123456789abcdef"})
		t := time.Now()
		var b bytes.Buffer
		err := calcnote.Write(&b, o, calcnote.Options{Company: "Example Engineering", Paper: os.Getenv("PAPER")})
		fmt.Println(name, err, b.Len(), time.Since(t))
		os.WriteFile("/tmp/cn/"+name+".pdf", b.Bytes(), 0o644)
	}
}
