-- Springs kept before there were three kinds also get where they fit and how they work, as their customer asked: their checks were made with it.
ALTER TABLE "quotes" DISABLE TRIGGER "quotes_frozen";--> statement-breakpoint
UPDATE "quotes" SET "design" = jsonb_set("design", '{spring}', "design"->'spring' || jsonb_build_object(
	'temperatureC', "asked"."requirement"->'hottestC',
	'duty', jsonb_build_object('cycles', "asked"."requirement"->'strokes', 'strokesPerMinute', "asked"."requirement"->'strokesPerMinute'),
	'fit', jsonb_strip_nulls(jsonb_build_object(
		'boreMm', "asked"."requirement"->'boreMm', 'rodMm', "asked"."requirement"->'rodMm',
		'maxFreeLengthMm', "asked"."requirement"->'maxFreeLengthMm', 'maxSolidLengthMm', "asked"."requirement"->'maxSolidLengthMm'
	))
)) FROM (SELECT "id", "request"->'requirement' AS "requirement" FROM "orders") AS "asked"
WHERE "asked"."id" = "quotes"."order_id" AND "design"->>'kind' = 'compression' AND NOT ("design"->'spring' ? 'temperatureC');--> statement-breakpoint
ALTER TABLE "quotes" ENABLE TRIGGER "quotes_frozen";
