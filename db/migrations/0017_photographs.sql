CREATE TABLE `photo` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`piece_id` integer NOT NULL,
	`step_key` text,
	`moment` text NOT NULL,
	`caption` text DEFAULT '' NOT NULL,
	`width` integer NOT NULL,
	`height` integer NOT NULL,
	`added_at` integer NOT NULL,
	`member_id` integer NOT NULL,
	`client_key` text NOT NULL,
	`removed_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`piece_id`) REFERENCES `piece`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "photo_moment" CHECK("photo"."moment" in ('before', 'after')),
	CONSTRAINT "photo_size" CHECK("photo"."width" > 0 and "photo"."height" > 0)
);
--> statement-breakpoint
CREATE INDEX `photo_of_piece` ON `photo` (`piece_id`);--> statement-breakpoint
CREATE INDEX `photo_removed` ON `photo` (`removed_at`) WHERE "photo"."removed_at" is not null;--> statement-breakpoint
CREATE UNIQUE INDEX `photo_studio_id_id_unique` ON `photo` (`studio_id`,`id`);--> statement-breakpoint
CREATE UNIQUE INDEX `photo_studio_id_client_key_unique` ON `photo` (`studio_id`,`client_key`);--> statement-breakpoint
PRAGMA foreign_keys=OFF;--> statement-breakpoint
CREATE TABLE `__new_attachment` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`photo_id` integer,
	`material_version_id` integer,
	`kind` text NOT NULL,
	`sha256` text NOT NULL,
	`bytes` integer NOT NULL,
	`name` text,
	`added_at` integer,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`photo_id`) REFERENCES `photo`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`material_version_id`) REFERENCES `material_version`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "attachment_kind" CHECK("__new_attachment"."kind" in ('photo', 'thumbnail', 'data sheet')),
	CONSTRAINT "attachment_bytes" CHECK("__new_attachment"."bytes" > 0),
	CONSTRAINT "attachment_of_one" CHECK(("__new_attachment"."photo_id" is null) <> ("__new_attachment"."material_version_id" is null))
);
--> statement-breakpoint
INSERT INTO `__new_attachment`("id", "studio_id", "photo_id", "material_version_id", "kind", "sha256", "bytes", "name", "added_at") SELECT "id", "studio_id", NULL, "material_version_id", "kind", "sha256", "bytes", "name", "added_at" FROM `attachment`;--> statement-breakpoint
DROP TABLE `attachment`;--> statement-breakpoint
ALTER TABLE `__new_attachment` RENAME TO `attachment`;--> statement-breakpoint
PRAGMA foreign_keys=ON;--> statement-breakpoint
CREATE UNIQUE INDEX `attachment_studio_id_id_unique` ON `attachment` (`studio_id`,`id`);