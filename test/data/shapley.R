# Writes shapley.csv and shapley-window.txt from the data set `shapley` of the R package spatstat.data.
# Run in this folder: Rscript shapley.R
# (Debian: apt-get install r-base-core r-cran-spatstat.data)
library(spatstat.data)

# The shortest decimal text that reads back as the same number.
exact <- function(x) vapply(x, function(v) {
  for (digits in 1:17) {
    text <- formatC(v, digits = digits, format = "g", flag = "")
    if (as.numeric(text) == v) return(format(v, digits = digits, scientific = FALSE, trim = TRUE))
  }
  stop("no exact text for ", v)
}, "")

rows <- data.frame(
  RA = exact(shapley$x), Dec = exact(shapley$y),
  Mag = exact(shapley$marks$Mag), V = exact(shapley$marks$V), SigV = exact(shapley$marks$SigV)
)
stopifnot(as.numeric(rows$RA) == shapley$x, as.numeric(rows$Dec) == shapley$y,
          as.numeric(rows$Mag) == shapley$marks$Mag)
write.csv(rows, "shapley.csv", row.names = FALSE, quote = FALSE)

ring <- shapley$window$bdry[[1]]
stopifnot(length(shapley$window$bdry) == 1)
writeLines(c(
  "# Window of the data set shapley (R package spatstat.data): a dilated convex hull of the galaxies.",
  "# RA and Dec in degrees, one vertex a line.",
  paste(exact(ring$x), exact(ring$y))
), "shapley-window.txt")
