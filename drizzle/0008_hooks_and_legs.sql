-- Hooks and legs are priced by the seconds each takes to form, so the share of a plain spring's pace goes. No quote was ever made with it.
DELETE FROM "price_book_rates" WHERE "code" IN ('coiling.pace-factor.extension', 'coiling.pace-factor.torsion');--> statement-breakpoint
-- New codes of every book there is. A price made by it stays the same to the cent: a tight index slows nothing until a new version says so.
INSERT INTO "price_book_rates" ("price_book_id", "code", "value")
SELECT "price_books"."id", "added"."code", "added"."value"
FROM "price_books" CROSS JOIN (VALUES
	('coiling.setup-factor.full-loop', 1.00),
	('coiling.setup-factor.half-loop', 1.05),
	('coiling.setup-factor.crossover-loop', 1.10),
	('coiling.setup-factor.extended-hook', 1.25),
	('coiling.setup-factor.tangential', 1.00),
	('coiling.setup-factor.straight', 1.15),
	('coiling.end-seconds.fine', 0.40),
	('coiling.end-seconds.light', 0.80),
	('coiling.end-seconds.medium', 2.50),
	('coiling.end-seconds.heavy', 6.00),
	('coiling.end-factor.full-loop', 1.00),
	('coiling.end-factor.half-loop', 0.80),
	('coiling.end-factor.crossover-loop', 1.15),
	('coiling.end-factor.extended-hook', 1.40),
	('coiling.end-factor.tangential', 0.80),
	('coiling.end-factor.straight', 1.00),
	('coiling.index-easy', 6),
	('coiling.index-slowing-percent', 0),
	('inspection.measurements-per-spring.extension', 5),
	('inspection.measurements-per-spring.torsion', 4),
	('gate.energy-max-j', 20),
	('gate.caution.hook', 1)
) AS "added" ("code", "value")
ON CONFLICT DO NOTHING;
