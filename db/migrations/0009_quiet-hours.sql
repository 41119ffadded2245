CREATE TABLE `quiet_hours` (
	`studio_id` integer NOT NULL,
	`member_id` integer PRIMARY KEY NOT NULL,
	`from_min` integer NOT NULL,
	`to_min` integer NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	CONSTRAINT "quiet_hours_span" CHECK("quiet_hours"."from_min" between 0 and 1439 and "quiet_hours"."to_min" between 0 and 1439 and "quiet_hours"."from_min" <> "quiet_hours"."to_min")
);
