CREATE TABLE `sensor_address` (
	`studio_id` integer NOT NULL,
	`room_id` integer PRIMARY KEY NOT NULL,
	`token_hash` text NOT NULL,
	`made_at` integer NOT NULL,
	`heard_at` integer,
	`refused_at` integer,
	`refusal` text,
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`room_id`) REFERENCES `room`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `sensor_address_token_hash_unique` ON `sensor_address` (`token_hash`);