// expect: kelp gated
// expect: rock gated
module reef (
	input  logic       clk, rst_n,
	input  logic       ebb,
	input  logic [7:0] tide,
	output logic [7:0] kelp,	// rising
	output logic [7:0] rock,
	input  wire        test_en
);
	// stillclock: kelp sleeps unless it is written
	wire wake_kelp = ebb;
	wire gclk_kelp;
	stillclock_icg u_icg_kelp (.clk(clk), .wake(wake_kelp), .test(test_en), .gclk(gclk_kelp));
	always_ff @(posedge gclk_kelp or negedge rst_n)
		if (!rst_n) kelp <= '0;
		else if (ebb) kelp <= tide;

	// stillclock: rock sleeps unless it is written; the branches are those of its block
	logic wake_rock;
	always_comb begin
		wake_rock = 1'b0;
		case (tide[1:0])
			2'd0: wake_rock = 1'b1;
			2'd1: if (ebb) wake_rock = 1'b1;
			default: ;
		endcase
	end
	wire gclk_rock;
	stillclock_icg u_icg_rock (.clk(clk), .wake(wake_rock), .test(test_en), .gclk(gclk_rock));
	always_ff @(posedge gclk_rock) begin
		case (tide[1:0])
			2'd0: rock <= tide;
			2'd1: if (ebb) rock <= ~tide;
			default: ;
		endcase
	end
endmodule
