CREATE TABLE `activity` (
	`id` varchar(36) NOT NULL,
	`study_id` varchar(36),
	`study_name` varchar(120),
	`user_id` varchar(36),
	`user_name` varchar(120) NOT NULL,
	`action` varchar(60) NOT NULL,
	`subject` varchar(300) NOT NULL,
	`change` json NOT NULL,
	`at` datetime(3) NOT NULL DEFAULT current_timestamp(3),
	CONSTRAINT `activity_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `candidates` (
	`id` varchar(36) NOT NULL,
	`study_id` varchar(36) NOT NULL,
	`sweep_id` varchar(36),
	`position` double NOT NULL,
	`inputs` json NOT NULL,
	`version` int NOT NULL DEFAULT 1,
	`pin` int,
	`result_key` varchar(64),
	`errors` json NOT NULL,
	`created_at` datetime(3) NOT NULL DEFAULT current_timestamp(3),
	`updated_at` datetime(3) NOT NULL DEFAULT current_timestamp(3),
	`deleted_at` datetime(3),
	CONSTRAINT `candidates_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `events` (
	`study_id` varchar(36) NOT NULL,
	`number` bigint NOT NULL,
	`payload` json NOT NULL,
	`at` datetime(3) NOT NULL DEFAULT current_timestamp(3),
	CONSTRAINT `events_study_id_number_pk` PRIMARY KEY(`study_id`,`number`)
);
--> statement-breakpoint
CREATE TABLE `members` (
	`study_id` varchar(36) NOT NULL,
	`user_id` varchar(36) NOT NULL,
	`role` enum('owner','editor','reviewer','observer') NOT NULL,
	`created_at` datetime(3) NOT NULL DEFAULT current_timestamp(3),
	CONSTRAINT `members_study_id_user_id_pk` PRIMARY KEY(`study_id`,`user_id`)
);
--> statement-breakpoint
CREATE TABLE `results` (
	`key` varchar(64) NOT NULL,
	`core_version` varchar(20) NOT NULL,
	`values` json,
	`curves` json,
	`errors` json NOT NULL,
	`computed_at` datetime(3) NOT NULL DEFAULT current_timestamp(3),
	CONSTRAINT `results_key` PRIMARY KEY(`key`)
);
--> statement-breakpoint
CREATE TABLE `sessions` (
	`id` varchar(36) NOT NULL,
	`user_id` varchar(36) NOT NULL,
	`created_at` datetime(3) NOT NULL DEFAULT current_timestamp(3),
	`last_seen_at` datetime(3) NOT NULL DEFAULT current_timestamp(3),
	`expires_at` datetime(3) NOT NULL,
	`user_agent` varchar(300) NOT NULL,
	CONSTRAINT `sessions_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `sign_in_failures` (
	`id` varchar(36) NOT NULL,
	`subject` varchar(300) NOT NULL,
	`at` datetime(3) NOT NULL DEFAULT current_timestamp(3),
	CONSTRAINT `sign_in_failures_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `studies` (
	`id` varchar(36) NOT NULL,
	`name` varchar(120) NOT NULL,
	`description` text NOT NULL,
	`requirements` json NOT NULL,
	`version` int NOT NULL DEFAULT 1,
	`event_number` bigint NOT NULL DEFAULT 0,
	`created_by` varchar(120) NOT NULL,
	`created_at` datetime(3) NOT NULL DEFAULT current_timestamp(3),
	`updated_at` datetime(3) NOT NULL DEFAULT current_timestamp(3),
	`archived_at` datetime(3),
	`deleted_at` datetime(3),
	CONSTRAINT `studies_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `sweeps` (
	`id` varchar(36) NOT NULL,
	`study_id` varchar(36) NOT NULL,
	`definition` json NOT NULL,
	`total` int NOT NULL,
	`made` int NOT NULL DEFAULT 0,
	`state` enum('running','done','cancelled','failed') NOT NULL DEFAULT 'running',
	`created_by` varchar(120) NOT NULL,
	`created_at` datetime(3) NOT NULL DEFAULT current_timestamp(3),
	`finished_at` datetime(3),
	CONSTRAINT `sweeps_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `tokens` (
	`id` varchar(36) NOT NULL,
	`user_id` varchar(36) NOT NULL,
	`name` varchar(80) NOT NULL,
	`scope` enum('read','write') NOT NULL,
	`hash` varchar(64) NOT NULL,
	`created_at` datetime(3) NOT NULL DEFAULT current_timestamp(3),
	`expires_at` datetime(3) NOT NULL,
	`last_used_at` datetime(3),
	CONSTRAINT `tokens_id` PRIMARY KEY(`id`),
	CONSTRAINT `tokens_hash` UNIQUE(`hash`)
);
--> statement-breakpoint
CREATE TABLE `users` (
	`id` varchar(36) NOT NULL,
	`email` varchar(254) NOT NULL,
	`name` varchar(120) NOT NULL,
	`password_hash` varchar(255) NOT NULL,
	`role` enum('admin','member') NOT NULL,
	`disabled_at` datetime(3),
	`created_at` datetime(3) NOT NULL DEFAULT current_timestamp(3),
	CONSTRAINT `users_id` PRIMARY KEY(`id`),
	CONSTRAINT `users_email` UNIQUE(`email`)
);
--> statement-breakpoint
ALTER TABLE `candidates` ADD CONSTRAINT `candidates_study_id_studies_id_fk` FOREIGN KEY (`study_id`) REFERENCES `studies`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `candidates` ADD CONSTRAINT `candidates_sweep` FOREIGN KEY (`sweep_id`) REFERENCES `sweeps`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `events` ADD CONSTRAINT `events_study_id_studies_id_fk` FOREIGN KEY (`study_id`) REFERENCES `studies`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `members` ADD CONSTRAINT `members_study_id_studies_id_fk` FOREIGN KEY (`study_id`) REFERENCES `studies`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `members` ADD CONSTRAINT `members_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sessions` ADD CONSTRAINT `sessions_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sweeps` ADD CONSTRAINT `sweeps_study_id_studies_id_fk` FOREIGN KEY (`study_id`) REFERENCES `studies`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `tokens` ADD CONSTRAINT `tokens_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `activity_study` ON `activity` (`study_id`,`at`);--> statement-breakpoint
CREATE INDEX `activity_at` ON `activity` (`at`);--> statement-breakpoint
CREATE INDEX `candidates_study` ON `candidates` (`study_id`,`deleted_at`,`position`);--> statement-breakpoint
CREATE INDEX `candidates_result` ON `candidates` (`result_key`);--> statement-breakpoint
CREATE INDEX `events_at` ON `events` (`at`);--> statement-breakpoint
CREATE INDEX `members_user` ON `members` (`user_id`);--> statement-breakpoint
CREATE INDEX `sessions_user` ON `sessions` (`user_id`);--> statement-breakpoint
CREATE INDEX `sessions_expiry` ON `sessions` (`expires_at`);--> statement-breakpoint
CREATE INDEX `sign_in_failures_subject` ON `sign_in_failures` (`subject`,`at`);--> statement-breakpoint
CREATE INDEX `studies_deleted` ON `studies` (`deleted_at`);--> statement-breakpoint
CREATE INDEX `sweeps_study` ON `sweeps` (`study_id`,`state`);--> statement-breakpoint
CREATE INDEX `tokens_user` ON `tokens` (`user_id`);