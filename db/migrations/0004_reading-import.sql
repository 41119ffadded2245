CREATE TABLE `reading_import` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`room_id` integer NOT NULL,
	`file_name` text NOT NULL,
	`from_at` integer NOT NULL,
	`to_at` integer NOT NULL,
	`lines` integer NOT NULL,
	`known` integer DEFAULT 0 NOT NULL,
	`told_at` integer NOT NULL,
	`member_id` integer,
	`client_key` text NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`room_id`) REFERENCES `room`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "reading_import_lines" CHECK("reading_import"."lines" > 0),
	CONSTRAINT "reading_import_order" CHECK("reading_import"."from_at" <= "reading_import"."to_at")
);
--> statement-breakpoint
CREATE UNIQUE INDEX `reading_import_studio_id_id_unique` ON `reading_import` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `reading_import_studio_id_client_key_unique` ON `reading_import` (`studio_id`,`client_key`);--> statement-breakpoint
PRAGMA foreign_keys=OFF;--> statement-breakpoint
CREATE TABLE `__new_reading` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`room_id` integer NOT NULL,
	`at` integer NOT NULL,
	`told_at` integer NOT NULL,
	`temp_c` real,
	`rh` real NOT NULL,
	`source` text NOT NULL,
	`doubt` real DEFAULT 0 NOT NULL,
	`member_id` integer,
	`client_key` text,
	`import_id` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`room_id`) REFERENCES `room`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`import_id`) REFERENCES `reading_import`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	CONSTRAINT "reading_source" CHECK("__new_reading"."source" in ('note', 'words', 'same', 'file', 'sensor', 'weather')),
	CONSTRAINT "reading_rh" CHECK("__new_reading"."rh" between 0 and 1),
	CONSTRAINT "reading_temp" CHECK("__new_reading"."temp_c" is null or "__new_reading"."temp_c" between -40 and 60),
	CONSTRAINT "reading_doubt" CHECK("__new_reading"."doubt" >= 0)
);
--> statement-breakpoint
INSERT INTO `__new_reading`("id", "studio_id", "room_id", "at", "told_at", "temp_c", "rh", "source", "doubt", "member_id", "client_key") SELECT "id", "studio_id", "room_id", "at", "told_at", "temp_c", "rh", "source", "doubt", "member_id", "client_key" FROM `reading`;--> statement-breakpoint
DROP TABLE `reading`;--> statement-breakpoint
ALTER TABLE `__new_reading` RENAME TO `reading`;--> statement-breakpoint
PRAGMA foreign_keys=ON;--> statement-breakpoint
CREATE INDEX `reading_of_import` ON `reading` (`import_id`) WHERE "reading"."import_id" is not null;--> statement-breakpoint
CREATE UNIQUE INDEX `reading_once` ON `reading` (`room_id`,`at`,`source`);--> statement-breakpoint
CREATE UNIQUE INDEX `reading_client_key` ON `reading` (`studio_id`,`client_key`);--> statement-breakpoint
CREATE UNIQUE INDEX `reading_studio_id_id_unique` ON `reading` (`studio_id`,`id`);