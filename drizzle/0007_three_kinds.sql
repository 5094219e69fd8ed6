-- Rates of springs with hooks or legs. A book that quotes have used is otherwise never edited; these codes are new, so no price made by it changes.
INSERT INTO "price_book_rates" ("price_book_id", "code", "value")
SELECT "price_books"."id", "added"."code", "added"."value"
FROM "price_books" CROSS JOIN (VALUES
	('coiling.setup-factor.extension', 2.00),
	('coiling.setup-factor.torsion', 2.00),
	('coiling.pace-factor.extension', 0.33),
	('coiling.pace-factor.torsion', 0.33)
) AS "added" ("code", "value")
ON CONFLICT DO NOTHING;--> statement-breakpoint
-- Designs kept before there were three kinds are all compression springs: they get the whole spring as it is evaluated, from the very values beside it.
-- A sent quote stays frozen for everybody else; nothing that was promised changes.
ALTER TABLE "quotes" DISABLE TRIGGER "quotes_frozen";--> statement-breakpoint
UPDATE "quotes" SET "design" = ("design" - 'ends' - 'seatingCoefficient') || jsonb_build_object(
	'evaluation', "design"->'evaluation' || '{"kind": "compression"}'::jsonb,
	'spring', jsonb_build_object(
		'kind', 'compression', 'material', "design"->'material', 'wireDiameterMm', "design"->'wireDiameterMm', 'meanDiameterMm', "design"->'meanDiameterMm',
		'activeCoils', "design"->'activeCoils', 'totalCoils', "design"->'totalCoils', 'freeLengthMm', "design"->'freeLengthMm', 'ends', "design"->'ends',
		'hand', "design"->'hand', 'seatingCoefficient', "design"->'seatingCoefficient', 'toleranceGrade', "design"->'toleranceGrade',
		'points', coalesce((SELECT jsonb_agg(jsonb_build_object('lengthMm', "point"->'lengthMm') ORDER BY "place") FROM jsonb_array_elements("design"->'evaluation'->'points') WITH ORDINALITY AS "points" ("point", "place")), '[]'::jsonb)
	)
) WHERE "design" IS NOT NULL AND NOT ("design" ? 'spring');--> statement-breakpoint
ALTER TABLE "quotes" ENABLE TRIGGER "quotes_frozen";
