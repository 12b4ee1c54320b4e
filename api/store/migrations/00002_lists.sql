-- +goose Up
CREATE INDEX record_created ON record (created, id);
CREATE INDEX record_kind ON record (kind, created, id);
CREATE INDEX record_class ON record (class, created, id);
CREATE INDEX record_tag_tag ON record_tag (tag);
