// expect: kelp gated
// expect: rock gated
module reef (
	input  logic       clk, rst_n,
	input  logic       ebb,
	input  logic [7:0] tide,
	output logic [7:0] kelp,	// rising
	output logic [7:0] rock
);
	always_ff @(posedge clk or negedge rst_n)
		if (!rst_n) kelp <= '0;
		else if (ebb) kelp <= tide;

	always_ff @(posedge clk) begin
		case (tide[1:0])
			2'd0: rock <= tide;
			2'd1: if (ebb) rock <= ~tide;
			default: ;
		endcase
	end
endmodule
