-- The first schema. Rows are added and never changed, but for arrival.filed_as,
-- which is set once. Days are counted from 1970-01-01; instants are milliseconds.

-- The lab calendar that days were computed by; the newest row counts.
CREATE TABLE calendar (
  nth INTEGER PRIMARY KEY,
  zone TEXT NOT NULL,
  cut_off TEXT NOT NULL
);

-- Every word that stands in many rows, once.
CREATE TABLE name (
  id INTEGER PRIMARY KEY,
  text TEXT NOT NULL UNIQUE
);

-- Mappings and settings by content.
CREATE TABLE text_version (
  id INTEGER PRIMARY KEY,
  kind TEXT NOT NULL,
  name TEXT NOT NULL,
  sha256 TEXT NOT NULL,
  text TEXT NOT NULL,
  UNIQUE (kind, name, sha256)
);

CREATE TABLE arrival (
  number INTEGER PRIMARY KEY,
  name TEXT NOT NULL,
  size BIGINT NOT NULL,
  sha256 TEXT NOT NULL,
  arrived_at BIGINT NOT NULL,
  lab_day INTEGER NOT NULL,
  mapping INTEGER REFERENCES text_version (id),
  outcome TEXT NOT NULL,
  row_count BIGINT NOT NULL,
  readings BIGINT NOT NULL,
  rejections BIGINT NOT NULL,
  skipped BIGINT NOT NULL,
  repeated BIGINT NOT NULL,
  reason TEXT NOT NULL,
  archive_name TEXT NOT NULL,
  -- archive_name as a file system that folds case and accents would see it
  archive_key TEXT NOT NULL,
  filed_as TEXT
);
-- One content is read once by one version of a mapping, whatever a program does.
CREATE UNIQUE INDEX arrival_read_once ON arrival (sha256, mapping) WHERE outcome = 'read';
CREATE INDEX arrival_day ON arrival (lab_day);
CREATE INDEX arrival_archive ON arrival (archive_key);
CREATE INDEX arrival_unfiled ON arrival (number) WHERE filed_as IS NULL;

CREATE TABLE subject (
  id INTEGER PRIMARY KEY,
  instrument INTEGER NOT NULL,
  sample INTEGER NOT NULL,
  analyte INTEGER NOT NULL,
  line INTEGER NOT NULL,
  UNIQUE (sample, analyte, line, instrument)
);

CREATE TABLE preparation (
  id INTEGER PRIMARY KEY,
  content TEXT NOT NULL UNIQUE
);

CREATE TABLE flask_facts (
  id INTEGER PRIMARY KEY,
  content TEXT NOT NULL UNIQUE,
  preparation INTEGER NOT NULL REFERENCES preparation (id),
  -- 1 when the addition is other than none
  spiked INTEGER NOT NULL
);

-- What the readings of one table of one delivery have in common.
CREATE TABLE origin (
  id INTEGER PRIMARY KEY,
  arrival INTEGER NOT NULL REFERENCES arrival (number),
  file INTEGER NOT NULL,
  -- 0 for text files
  sheet INTEGER NOT NULL,
  column_no INTEGER NOT NULL,
  batch INTEGER NOT NULL,
  delimits INTEGER NOT NULL,
  flask_mapped INTEGER NOT NULL,
  replicate_mapped INTEGER NOT NULL
);

-- The identity of a reading and its versions. A timed reading has its instant and batch 0;
-- an untimed one has instant 0 and the name of its batch, which is never 0.
CREATE TABLE reading (
  subject INTEGER NOT NULL,
  read_at BIGINT NOT NULL,
  batch INTEGER NOT NULL,
  preparation INTEGER NOT NULL,
  flask INTEGER NOT NULL,
  replicate INTEGER NOT NULL,
  nth INTEGER NOT NULL,
  -- NULL where the instrument gave no number
  signal DOUBLE PRECISION,
  -- 0 a number, 1 over range, 2 below range, 3 missing; 4 a mean of several readings, behind
  -- whose text stand their standard deviation and number, each after a U+001F
  state INTEGER NOT NULL,
  text TEXT NOT NULL,
  facts INTEGER NOT NULL,
  origin INTEGER NOT NULL,
  line_no BIGINT NOT NULL,
  -- the internal standard's signal, where there is one
  standard DOUBLE PRECISION,
  PRIMARY KEY (subject, read_at, batch, preparation, flask, replicate, nth)
) WITHOUT ROWID;

CREATE TABLE rejection (
  arrival INTEGER NOT NULL,
  nth BIGINT NOT NULL,
  reason INTEGER NOT NULL,
  file INTEGER NOT NULL,
  sheet INTEGER NOT NULL,
  line_no BIGINT NOT NULL,
  column_no INTEGER NOT NULL,
  header INTEGER NOT NULL,
  found TEXT NOT NULL,
  expected TEXT NOT NULL,
  PRIMARY KEY (arrival, nth)
) WITHOUT ROWID;

-- Which subjects have a reading on a lab day, and the delivery that brought the first.
CREATE TABLE subject_day (
  day INTEGER NOT NULL,
  subject INTEGER NOT NULL,
  arrival INTEGER NOT NULL,
  PRIMARY KEY (day, subject)
) WITHOUT ROWID;

-- The lab day of a batch without times: that of the delivery that brought the first of it.
CREATE TABLE untimed_batch (
  subject INTEGER NOT NULL,
  batch INTEGER NOT NULL,
  day INTEGER NOT NULL,
  arrival INTEGER NOT NULL,
  PRIMARY KEY (subject, batch)
) WITHOUT ROWID;

-- The lab days of a timed batch that delimits its series, however long it pauses.
CREATE TABLE delimited_day (
  subject INTEGER NOT NULL,
  batch INTEGER NOT NULL,
  day INTEGER NOT NULL,
  arrival INTEGER NOT NULL,
  PRIMARY KEY (subject, batch, day)
) WITHOUT ROWID;

-- Deliveries that brought something new to a lab day.
CREATE TABLE brought (
  day INTEGER NOT NULL,
  arrival INTEGER NOT NULL,
  PRIMARY KEY (day, arrival)
) WITHOUT ROWID;

-- Deliveries after which a lab day is to be looked at again; a superset of brought.
CREATE TABLE touched (
  day INTEGER NOT NULL,
  arrival INTEGER NOT NULL,
  PRIMARY KEY (day, arrival)
) WITHOUT ROWID;

CREATE TABLE series (
  id INTEGER PRIMARY KEY,
  day INTEGER NOT NULL,
  subject INTEGER NOT NULL,
  batch INTEGER NOT NULL,
  preparation INTEGER NOT NULL,
  ordinal INTEGER NOT NULL,
  UNIQUE (subject, day, batch, preparation, ordinal)
);

CREATE TABLE result_version (
  id INTEGER PRIMARY KEY,
  series INTEGER NOT NULL REFERENCES series (id),
  nth INTEGER NOT NULL,
  inputs_sha256 TEXT NOT NULL,
  settings INTEGER NOT NULL REFERENCES text_version (id),
  program TEXT NOT NULL,
  verdict TEXT NOT NULL,
  severity INTEGER NOT NULL,
  content TEXT NOT NULL,
  UNIQUE (series, nth)
);

-- Each time a lab day was looked at, whether or not a revision came of it.
CREATE TABLE day_look (
  day INTEGER NOT NULL,
  nth INTEGER NOT NULL,
  moment BIGINT NOT NULL,
  in_progress INTEGER NOT NULL,
  arrival_limit INTEGER NOT NULL,
  waiting_until BIGINT,
  PRIMARY KEY (day, nth)
) WITHOUT ROWID;

CREATE TABLE revision (
  day INTEGER NOT NULL,
  number INTEGER NOT NULL,
  look INTEGER NOT NULL,
  settings INTEGER NOT NULL REFERENCES text_version (id),
  program TEXT NOT NULL,
  results INTEGER NOT NULL,
  PRIMARY KEY (day, number)
) WITHOUT ROWID;

-- The result versions a revision shows, in the order of their keys.
CREATE TABLE revision_result (
  day INTEGER NOT NULL,
  revision INTEGER NOT NULL,
  place INTEGER NOT NULL,
  result_version INTEGER NOT NULL,
  PRIMARY KEY (day, revision, place)
) WITHOUT ROWID;

-- The files in which a revision was issued.
CREATE TABLE issue (
  day INTEGER NOT NULL,
  revision INTEGER NOT NULL,
  workbook TEXT NOT NULL,
  workbook_sha256 TEXT NOT NULL,
  csv TEXT NOT NULL,
  csv_sha256 TEXT NOT NULL,
  PRIMARY KEY (day, revision)
) WITHOUT ROWID
