# Writes road-casualties.csv from the data set Seatbelts of base R (package datasets): road casualties in Great
# Britain by month, 1969-1984. Sources given there: Harvey (1989), Forecasting, Structural Time Series Models and
# the Kalman Filter, pp. 519-523; Durbin and Koopman (2001), Time Series Analysis by State Space Methods.
# Run in this folder: Rscript road-casualties.R
months <- sprintf("%d-%02d", floor(time(Seatbelts) + 1e-9), cycle(Seatbelts))
columns <- c("drivers", "kms", "PetrolPrice", "law")
lines <- apply(Seatbelts[, columns], 1, function(row) paste(formatC(row, digits = 15, width = 1, format = "g"), collapse = ","))
writeLines(c("month,drivers,kms,petrol,law", paste(months, lines, sep = ",")), "road-casualties.csv")
