CREATE TABLE `jobs` (
	`id` varchar(36) NOT NULL,
	`study_id` varchar(36) NOT NULL,
	`candidate_id` varchar(36) NOT NULL,
	`kind` enum('labels','parameters') NOT NULL,
	`definition` json NOT NULL,
	`state` enum('queued','running','done','cancelled','failed') NOT NULL DEFAULT 'queued',
	`progress` json,
	`error` varchar(1000),
	`result_id` varchar(36),
	`created_by` varchar(120) NOT NULL,
	`created_by_id` varchar(36) NOT NULL,
	`created_at` datetime(3) NOT NULL DEFAULT current_timestamp(3),
	`updated_at` datetime(3) NOT NULL DEFAULT current_timestamp(3),
	CONSTRAINT `jobs_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
ALTER TABLE `jobs` ADD CONSTRAINT `jobs_study_id_studies_id_fk` FOREIGN KEY (`study_id`) REFERENCES `studies`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `jobs` ADD CONSTRAINT `jobs_candidate_id_candidates_id_fk` FOREIGN KEY (`candidate_id`) REFERENCES `candidates`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `jobs_study` ON `jobs` (`study_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `jobs_state` ON `jobs` (`state`,`updated_at`);