CREATE TABLE `plan_mate` (
	`studio_id` integer NOT NULL,
	`plan_id` integer NOT NULL,
	`turn_id` integer NOT NULL,
	`member_id` integer NOT NULL,
	PRIMARY KEY(`plan_id`, `turn_id`, `member_id`),
	FOREIGN KEY (`studio_id`) REFERENCES `studio`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`plan_id`) REFERENCES `plan`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`turn_id`) REFERENCES `turn`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`studio_id`,`member_id`) REFERENCES `member`(`studio_id`,`id`) ON UPDATE no action ON DELETE cascade
);
