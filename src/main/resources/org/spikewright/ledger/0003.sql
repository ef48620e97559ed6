-- Readings beside the samples (drift checks, calibration solutions), and the history of controls.

ALTER TABLE arrival ADD COLUMN checks BIGINT NOT NULL DEFAULT 0;
ALTER TABLE arrival ADD COLUMN calibrations BIGINT NOT NULL DEFAULT 0;

-- A timed reading has its instant and batch 0; an untimed one has instant 0 and its batch.
-- The newest delivery of an identity counts.
CREATE TABLE batch_reading (
  day INTEGER NOT NULL,
  -- 0 a drift check, 1 a calibration solution
  kind INTEGER NOT NULL,
  subject INTEGER NOT NULL,
  read_at BIGINT NOT NULL,
  batch INTEGER NOT NULL,
  ordinal INTEGER NOT NULL,
  arrival INTEGER NOT NULL,
  batch_name INTEGER NOT NULL,
  delimits INTEGER NOT NULL,
  -- NULL where the instrument gave no number
  signal DOUBLE PRECISION,
  -- 0 a number, 1 over range, 2 below range, 3 missing
  state INTEGER NOT NULL,
  text TEXT NOT NULL,
  -- NULL for a drift check
  concentration DOUBLE PRECISION,
  unit TEXT NOT NULL,
  file INTEGER NOT NULL,
  -- 0 for text files
  sheet INTEGER NOT NULL,
  line_no BIGINT NOT NULL,
  column_no INTEGER NOT NULL,
  PRIMARY KEY (kind, subject, read_at, batch, ordinal, arrival)
) WITHOUT ROWID;
CREATE INDEX batch_reading_day ON batch_reading (day);

-- What each control came to in a revision.
CREATE TABLE control_point (
  day INTEGER NOT NULL,
  revision INTEGER NOT NULL,
  place INTEGER NOT NULL,
  -- the control's name in the laboratory's own list, whatever its sample ID was that day
  name INTEGER NOT NULL,
  kind TEXT NOT NULL,
  instrument INTEGER NOT NULL,
  analyte INTEGER NOT NULL,
  line INTEGER NOT NULL,
  unit TEXT NOT NULL,
  value DOUBLE PRECISION NOT NULL,
  reference DOUBLE PRECISION,
  lower_limit DOUBLE PRECISION,
  upper_limit DOUBLE PRECISION,
  PRIMARY KEY (day, revision, place)
) WITHOUT ROWID;
