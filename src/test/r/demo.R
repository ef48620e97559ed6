# Recomputes every series of watch-folder-example from its exports, with R's own functions and
# nothing of the program. Run from the project's top folder:
#   Rscript src/test/r/demo.R series > src/test/resources/reference/demo-r.csv
#   Rscript src/test/r/demo.R flasks > src/test/resources/reference/demo-r-flasks.csv
# Base R only. What the exports do not say (stocks, volumes) stands under "what the methods say".

if (!l10n_info()[["UTF-8"]]) stop("headers hold a µ: run in a UTF-8 locale, such as LC_ALL=C.UTF-8")

inbox <- "watch-folder-example/inbox"

# ---- reading -------------------------------------------------------------------------------

furnace <- function(path) {
  bytes <- readBin(path, "raw", file.size(path))
  lines <- strsplit(iconv(rawToChar(bytes), "CP1252", "UTF-8"), "\r\n")[[1]]
  # A file that ends inside a quoted field is refused as a whole.
  if (sum(strsplit(paste(lines, collapse = ""), "")[[1]] == '"') %% 2 == 1) return(NULL)
  header <- grep("^Sample label;", lines)[1]
  table <- read.table(text = lines[header:length(lines)], sep = ";", quote = '"', header = TRUE,
                      check.names = FALSE, colClasses = "character", comment.char = "")
  table <- table[table$Type %in% c("Sample", "Control", "Blank"), ]
  data.frame(instrument = "furnace", sample = table[["Sample label"]], analyte = table$Element,
             flask = table$Position, addition = as.numeric(table[["Spike (µL)"]]),
             signal = sub(",", ".", table[["Peak area (s)"]], fixed = TRUE),
             aliquot = as.numeric(sub(",", ".", table[["Aliquot (mL)"]], fixed = TRUE)),
             per_sample = 1)
}

stripping <- function(path) {
  connection <- file(path, encoding = "UTF-16LE")
  lines <- readLines(connection)
  close(connection)
  lines[1] <- sub("^\ufeff", "", lines[1])
  table <- read.table(text = lines, sep = "\t", quote = "", header = TRUE, check.names = FALSE,
                      colClasses = "character", comment.char = "")
  data.frame(instrument = "stripping", sample = table$Sample, analyte = table$Metal,
             flask = table$Step, addition = as.numeric(table[["Added so far (µL)"]]),
             signal = table[["Peak (nA)"]], aliquot = 10, per_sample = 1)
}

# The second sheet of a workbook as a character matrix, from its XML.
sheet2 <- function(path) {
  entry <- function(name) {
    folder <- tempfile()
    text <- paste(readLines(unzip(path, name, exdir = folder), warn = FALSE, encoding = "UTF-8"),
                  collapse = "")
    unlink(folder, recursive = TRUE)
    text
  }
  pieces <- function(pattern, text) {
    found <- gregexpr(pattern, text, perl = TRUE)
    regmatches(text, found)[[1]]
  }
  strings <- gsub("<[^>]+>", "", pieces("<si>.*?</si>", entry("xl/sharedStrings.xml")))
  for (e in list(c("&quot;", '"'), c("&lt;", "<"), c("&gt;", ">"), c("&amp;", "&")))
    strings <- gsub(e[1], e[2], strings, fixed = TRUE)
  cells <- pieces("<c r=.*?</c>", entry("xl/worksheets/sheet2.xml"))
  value <- sub(".*<v>(.*)</v>.*", "\\1", cells)
  text <- grepl('t="s"', cells)
  value[text] <- strings[as.integer(value[text]) + 1]
  row <- as.integer(sub('<c r="[A-Z]+([0-9]+)".*', "\\1", cells))
  column <- match(sub('<c r="([A-Z]+).*', "\\1", cells), LETTERS)
  out <- matrix(NA_character_, max(row), max(column))
  out[cbind(row, column)] <- value
  header <- which(out[, 1] == "Sample ID")
  colnames(out) <- out[header, ]
  out[(header + 1):nrow(out), ]
}

plasma <- function(path) {
  table <- sheet2(path)
  per_sample <- 1
  if ("Test portion (g)" %in% colnames(table)) {
    # µg/L in the diluted digest to mg/kg dry: times dilution, times L of digest, over g of dry
    # sediment gives µg/g.
    parts <- sapply(strsplit(table[, "Dilution"], " + ", fixed = TRUE),
                    function(p) sum(as.numeric(p)) / as.numeric(p[1]))
    per_sample <- parts * (as.numeric(table[, "Digest (mL)"]) / 1000) /
      as.numeric(table[, "Test portion (g)"]) / (as.numeric(table[, "Dry mass (%)"]) / 100)
  }
  data.frame(instrument = "plasma", sample = table[, "Sample ID"], analyte = table[, "Element"],
             flask = table[, "Flask"], addition = as.numeric(table[, "Spike (µL)"]),
             signal = table[, "Intensity"],
             aliquot = if (length(per_sample) > 1) 10 else 20, per_sample = per_sample)
}

# ---- what the methods say ------------------------------------------------------------------

stock <- c(Cd = 1, Pb = 20, Ni = 5, Cu = 2, Zn = 10)      # mg/L
start_volume <- c(Zn = 20)                                # mL, one vessel; the others are made up
unit <- c(Cd = "µg/L", Pb = "µg/L", Ni = "µg/L", Cu = "mg/kg dry", Zn = "µg/L")

# ---- evaluation ----------------------------------------------------------------------------

flasks_of <- function(rows) {
  analyte <- rows$analyte[1]
  # Words (over range) and what is no number (a refused row) leave no value.
  rows$value <- suppressWarnings(as.numeric(rows$signal))
  rows <- rows[!is.na(rows$value), ]
  rows <- rows[order(as.integer(rows$flask)), ]
  groups <- split(rows, factor(rows$flask, unique(rows$flask)))
  out <- do.call(rbind, lapply(groups, function(g) {
    # mg/L times µL is ng; over mL it is µg/L.
    x <- stock[[analyte]] * g$addition[1] / g$aliquot[1]
    factor <- if (analyte %in% names(start_volume))
      (start_volume[[analyte]] + g$addition[1] / 1000) / start_volume[[analyte]] else 1
    data.frame(instrument = g$instrument[1], sample = g$sample[1], analyte = analyte,
               flask = g$flask[1], addition_ul = g$addition[1], x = x, readings = nrow(g),
               mean = mean(g$value), replicate_sd = sd(g$value), volume_factor = factor,
               y = mean(g$value) * factor)
  }))
  out$rstudent <- rstudent(lm(y ~ x, out))
  out
}

evaluate <- function(flasks, per_sample) {
  line <- lm(y ~ x, flasks)
  n <- nrow(flasks)
  a <- coef(line)[[1]]
  b <- coef(line)[[2]]
  s <- summary(line)$sigma
  v <- vcov(line)
  native <- a / b
  # Delta method from R's covariance matrix.
  gradient <- c(1 / b, -a / b^2)
  se <- sqrt(drop(t(gradient) %*% v %*% gradient))
  # Fieller: the values z with (a - z b)^2 <= t^2 var(a - z b), a quadratic in z.
  t2 <- qt(0.975, n - 2)^2
  g <- t2 * v[2, 2] / b^2
  A <- b^2 - t2 * v[2, 2]
  B <- a * b - t2 * v[1, 2]
  C <- a^2 - t2 * v[1, 1]
  ends <- if (g < 1) (B + c(-1, 1) * sqrt(B^2 - A * C)) / A else c(NA, NA)
  bent <- lm(y ~ x + I(x^2), flasks)
  q <- coef(bent)
  bend_t <- summary(bent)$coefficients[3, 3]
  odd <- which.max(abs(flasks$rstudent))
  analyte <- flasks$analyte[1]
  data.frame(
    instrument = flasks$instrument[1], sample = flasks$sample[1], analyte = analyte,
    flasks = n, readings = sum(flasks$readings), axis_unit = "µg/L",
    slope = b, signal_intercept = a, residual_sd = s, r = cor(flasks$x, flasks$y),
    native = native, native_se = se, native_lower95 = ends[1], native_upper95 = ends[2], g = g,
    bend_t = bend_t, bend_p_one_sided = pt(bend_t, n - 3),
    bent_native = 2 * q[[1]] / (q[[2]] + sqrt(q[[2]]^2 - 4 * q[[1]] * q[[3]])),
    odd_flask = flasks$flask[odd], odd_t = flasks$rstudent[odd],
    odd_p = 2 * pt(-abs(flasks$rstudent[odd]), n - 3),
    to_result = per_sample, result = native * per_sample, result_se = se * per_sample,
    lower95 = ends[1] * per_sample, upper95 = ends[2] * per_sample, unit = unit[[analyte]])
}

# ---- output --------------------------------------------------------------------------------

print_csv <- function(table, what) {
  cat("# ", what, " of watch-folder-example, recomputed with ", R.version.string, "\n",
      "# by: Rscript src/test/r/demo.R ", what, "\n", sep = "")
  for (name in names(table)) if (is.numeric(table[[name]]))
    table[[name]] <- sprintf("%.15g", table[[name]])
  cat(paste(names(table), collapse = ","), "\n", sep = "")
  cat(do.call(paste, c(unname(as.list(table)), sep = ",")), sep = "\n")
}

paths <- function(folder, pattern) sort(list.files(file.path(inbox, folder), pattern, full.names = TRUE))
rows <- rbind(
  do.call(rbind, lapply(paths("furnace", "csv$"), furnace)),
  do.call(rbind, lapply(paths("plasma", "xlsx$"), plasma)),
  do.call(rbind, lapply(paths("stripping", "tsv$"), stripping)))
keys <- paste(rows$instrument, rows$analyte, rows$sample)
all <- lapply(split(rows, factor(keys, sort(unique(keys), method = "radix"))), function(series) {
  flasks <- flasks_of(series)
  list(flasks = flasks, result = evaluate(flasks, series$per_sample[1]))
})
what <- commandArgs(TRUE)[1]
print_csv(do.call(rbind, lapply(all, `[[`, if (what == "flasks") "flasks" else "result")), what)
