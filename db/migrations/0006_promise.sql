CREATE TABLE `promise_basis` (
	`studio_id` integer PRIMARY KEY NOT NULL,
	`rework_of_ten` real,
	`bench_share` real,
	`changed_at` integer NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	CONSTRAINT "promise_basis_rework" CHECK("promise_basis"."rework_of_ten" is null or "promise_basis"."rework_of_ten" between 0 and 9),
	CONSTRAINT "promise_basis_share" CHECK("promise_basis"."bench_share" is null or "promise_basis"."bench_share" between 0.1 and 1)
);
--> statement-breakpoint
CREATE TABLE `promise_watch` (
	`order_id` integer PRIMARY KEY NOT NULL,
	`studio_id` integer NOT NULL,
	`promise_id` integer NOT NULL,
	`reckoned_at` integer NOT NULL,
	`likely_at` integer NOT NULL,
	`date_at` integer NOT NULL,
	`slipping` integer DEFAULT false NOT NULL,
	`slips` integer DEFAULT 0 NOT NULL,
	`since_at` integer,
	`cause` text,
	`rescue_batch_id` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`order_id`) REFERENCES `order`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`promise_id`) REFERENCES `promise`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`rescue_batch_id`) REFERENCES `batch`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "promise_watch_cause" CHECK("promise_watch"."cause" is null or "promise_watch"."cause" in ('drying', 'rework', 'minutes', 'hours', 'waiting')),
	CONSTRAINT "promise_watch_since" CHECK(("promise_watch"."slipping" = 1) = ("promise_watch"."since_at" is not null))
);
