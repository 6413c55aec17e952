module adjoin

go 1.26
