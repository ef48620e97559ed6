-- What the pools of a closed lab day came to, made with its first revision after its close and used
-- by all later ones; nth is above 1 where they were made anew.
CREATE TABLE day_pools (
  day INTEGER NOT NULL,
  nth INTEGER NOT NULL,
  program TEXT NOT NULL,
  nights INTEGER NOT NULL,
  PRIMARY KEY (day, nth)
) WITHOUT ROWID;

CREATE TABLE day_pool (
  day INTEGER NOT NULL,
  nth INTEGER NOT NULL,
  pool INTEGER NOT NULL REFERENCES name (id),
  evidence TEXT NOT NULL,
  remembered TEXT NOT NULL,
  PRIMARY KEY (day, nth, pool)
) WITHOUT ROWID;
