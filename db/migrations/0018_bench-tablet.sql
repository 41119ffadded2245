PRAGMA foreign_keys=OFF;--> statement-breakpoint
CREATE TABLE `__new_bench_tablet` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`name` text NOT NULL,
	`room_id` integer,
	`token_hash` text NOT NULL,
	`lock_min` integer DEFAULT 5 NOT NULL,
	`made_at` integer NOT NULL,
	`pairs_till` integer,
	`paired_at` integer,
	`open_till` integer,
	`as_member_id` integer,
	`as_till` integer,
	`revoked_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`room_id`) REFERENCES `room`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`as_member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "bench_tablet_lock" CHECK("__new_bench_tablet"."lock_min" between 1 and 60)
);
--> statement-breakpoint
INSERT INTO `__new_bench_tablet`("id", "studio_id", "name", "token_hash", "made_at", "revoked_at") SELECT "id", "studio_id", "name", "token_hash", "made_at", "revoked_at" FROM `bench_tablet`;--> statement-breakpoint
DROP TABLE `bench_tablet`;--> statement-breakpoint
ALTER TABLE `__new_bench_tablet` RENAME TO `bench_tablet`;--> statement-breakpoint
PRAGMA foreign_keys=ON;--> statement-breakpoint
CREATE UNIQUE INDEX `bench_tablet_token_hash_unique` ON `bench_tablet` (`token_hash`);--> statement-breakpoint
CREATE UNIQUE INDEX `bench_tablet_studio_id_id_unique` ON `bench_tablet` (`studio_id`,`id`);--> statement-breakpoint
ALTER TABLE `member` ADD `pin_wrong` integer DEFAULT 0 NOT NULL;--> statement-breakpoint
ALTER TABLE `member` ADD `pin_locked_till` integer;