-- Trigram search over names. Trusted since PostgreSQL 13: the schema owner may add it.
CREATE EXTENSION IF NOT EXISTS pg_trgm;
