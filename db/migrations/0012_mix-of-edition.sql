PRAGMA foreign_keys=OFF;--> statement-breakpoint
CREATE TABLE `__new_mix` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`studio_id` integer NOT NULL,
	`material_id` integer NOT NULL,
	`version_id` integer NOT NULL,
	`basis` text DEFAULT 'volume' NOT NULL,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`material_id`) REFERENCES `material`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`studio_id`,`version_id`) REFERENCES `material_version`(`studio_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "mix_basis" CHECK("__new_mix"."basis" in ('weight', 'volume'))
);
--> statement-breakpoint
INSERT INTO `__new_mix`("id", "studio_id", "material_id", "version_id", "basis") SELECT "id", "studio_id", "material_id", (SELECT max("version"."id") FROM `material_version` AS "version" WHERE "version"."material_id" = `mix`."material_id"), 'volume' FROM `mix`;--> statement-breakpoint
DROP TABLE `mix`;--> statement-breakpoint
ALTER TABLE `__new_mix` RENAME TO `mix`;--> statement-breakpoint
PRAGMA foreign_keys=ON;--> statement-breakpoint
CREATE UNIQUE INDEX `mix_version_id_unique` ON `mix` (`version_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `mix_studio_id_id_unique` ON `mix` (`studio_id`,`id`);