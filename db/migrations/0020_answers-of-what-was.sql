PRAGMA foreign_keys=OFF;--> statement-breakpoint
CREATE TABLE `__new_vapour_start` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`room_id` integer NOT NULL,
	`act_id` integer NOT NULL,
	`at` integer NOT NULL,
	`member_id` integer,
	`exhaust` text NOT NULL,
	`flames_off` integer NOT NULL,
	`nobody_else` integer NOT NULL,
	`ended_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`room_id`) REFERENCES `room`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`act_id`) REFERENCES `act`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "vapour_start_exhaust" CHECK("__new_vapour_start"."exhaust" in ('running', 'none'))
);
--> statement-breakpoint
INSERT INTO `__new_vapour_start`("id", "studio_id", "room_id", "act_id", "at", "member_id", "exhaust", "flames_off", "nobody_else", "ended_at") SELECT "id", "studio_id", "room_id", "act_id", "at", "member_id", "exhaust", "flames_off", "nobody_else", "ended_at" FROM `vapour_start`;--> statement-breakpoint
DROP TABLE `vapour_start`;--> statement-breakpoint
ALTER TABLE `__new_vapour_start` RENAME TO `vapour_start`;--> statement-breakpoint
PRAGMA foreign_keys=ON;--> statement-breakpoint
CREATE INDEX `vapour_start_of_room` ON `vapour_start` (`studio_id`,`room_id`,`at`);--> statement-breakpoint
CREATE UNIQUE INDEX `vapour_start_studio_id_id_unique` ON `vapour_start` (`studio_id`,`id`);