-- A source that does not find a resource, in a row: how often, and since when.
ALTER TABLE fetch ADD COLUMN missing INTEGER NOT NULL DEFAULT 0;
ALTER TABLE fetch ADD COLUMN missing_since INTEGER;

-- Names other than the reference by which the winning versions can be referred to: identifier:system|value.
CREATE TABLE name (
    source   TEXT NOT NULL,
    name     TEXT NOT NULL,
    resource INTEGER NOT NULL REFERENCES resource (id),
    PRIMARY KEY (source, name, resource)
) STRICT, WITHOUT ROWID;
CREATE INDEX name_by_resource ON name (resource);

-- References that URNs in the body stood for in the Bundle that brought it: a JSON object.
ALTER TABLE version ADD COLUMN links TEXT;
