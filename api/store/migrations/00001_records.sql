-- +goose Up
CREATE TABLE record (
    id             TEXT   NOT NULL PRIMARY KEY, -- SHA-256 of the canonical case
    created        BIGINT NOT NULL,             -- microseconds since 1970, UTC
    title          TEXT   NOT NULL,
    author         TEXT   NOT NULL,
    tags           TEXT   NOT NULL,             -- JSON list, in the order given
    kind           TEXT   NOT NULL,
    class          TEXT   NOT NULL,
    engine         TEXT   NOT NULL,
    catalogue      TEXT   NOT NULL,
    options        TEXT   NOT NULL,             -- JSON object
    searched       TEXT   NOT NULL,             -- title and author in lower case
    seal           TEXT   NOT NULL,             -- SHA-256 of everything else
    sent           TEXT   NOT NULL,             -- the case as it was sent
    canonical      TEXT   NOT NULL,
    answer         TEXT   NOT NULL
);

CREATE TABLE record_tag (
    record_id TEXT NOT NULL REFERENCES record (id) ON DELETE CASCADE,
    tag       TEXT NOT NULL,
    PRIMARY KEY (record_id, tag)
);
