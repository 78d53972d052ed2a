module galeward

go 1.26
